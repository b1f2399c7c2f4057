import { readFile } from 'node:fs/promises';
import { benchAnswers } from '@/tests/support/e2e/bench-page';
import { expect, test } from '@/tests/support/e2e/journey';
import { newBooking } from '@/tests/support/e2e/new-booking';

test('the sheet has a code to scan, a PDF from the worker, and a short link that says when a newer version exists', async ({ signedIn }) => {
  const page = await signedIn('radiographer');
  const booking = await newBooking(page.context(), 9131);
  await page.goto(`/bench/${booking.id}`);
  await benchAnswers(page);
  await page.getByRole('button', { name: 'Save plan' }).click();
  await expect(page.getByText('Saved: draft, version 1')).toBeVisible();
  await page.getByRole('link', { name: 'Plan sheet' }).click();
  await expect(page.getByRole('img', { name: /^Code to scan/ })).toBeVisible();
  const link = await page.getByText(/\/p\/[2-9A-Z]{8}\?v=1$/).innerText();

  await page.getByRole('button', { name: 'Make a PDF, A4' }).press('Enter');
  const file = page.getByRole('link', { name: /^Download the PDF, A4, \d+ kB$/ });
  await expect(file).toBeVisible({ timeout: 30_000 });
  const [download] = await Promise.all([page.waitForEvent('download'), file.click()]);
  expect(download.suggestedFilename()).toBe('plan-sheet-v1.pdf');
  const bytes = await readFile(await download.path());
  expect(bytes.subarray(0, 5).toString()).toBe('%PDF-');
  expect(bytes.toString('latin1').match(/\/Type \/Page\b/g)).toHaveLength(1);

  await page.getByRole('link', { name: 'Back to the bench' }).click();
  await benchAnswers(page);
  await page.locator('[data-remedy]').first().getByRole('button', { name: /^Adopt/ }).click();
  await page.getByRole('button', { name: 'Save plan' }).click();
  await expect(page.getByText('Saved: draft, version 2')).toBeVisible();
  await page.goto(link);
  await expect(page.getByText('This is version 1. The newest is version 2.')).toBeVisible();
});
