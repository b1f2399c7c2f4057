import { benchAnswers } from '@/tests/support/e2e/bench-page';
import { accountOf, expect, test } from '@/tests/support/e2e/journey';
import { linkIn, mailTo } from '@/tests/support/e2e/mail';
import { anotherPerson, newBooking } from '@/tests/support/e2e/new-booking';

test('a plan with fold left: asked, sent back with a reason, signed off, and its outcome recorded in two presses', async ({ signedIn, browser }) => {
  const page = await signedIn('radiographer');
  const booking = await newBooking(page.context(), 9101);
  await page.goto(`/bench/${booking.id}`);
  await benchAnswers(page);
  await page.getByRole('button', { name: 'Save plan' }).click();
  await expect(page.getByText('Saved: draft, version 1')).toBeVisible();

  await page.goto(`/bookings/${booking.id}`);
  await page.getByRole('link', { name: 'Open the plan' }).click();
  const release = page.getByRole('button', { name: 'Put version 1 for use and ask for sign-off' });
  await expect(page.getByText('because fold is left in the keep-clear area')).toBeVisible();
  await release.click();
  await expect(page.getByRole('heading', { name: 'Waits for a radiologist’s sign-off' })).toBeVisible();
  const planUrl = page.url();

  const mail = await mailTo((await accountOf('radiologist')).email, `Sign-off asked: ${booking.accession}, version 1`);
  const radiologist = await anotherPerson(browser, 'radiologist');
  await radiologist.goto(linkIn(mail));
  await expect(radiologist.getByRole('heading', { name: 'Your decision on version 1' })).toBeVisible();
  await radiologist.getByRole('button', { name: 'Send back with this reason' }).click();
  await expect(radiologist.getByText('needed when a plan is sent back: what should change')).toBeVisible();
  await radiologist.getByLabel('Reason').fill('Try the larger FOV first.');
  await radiologist.getByRole('button', { name: 'Send back with this reason' }).click();
  await expect(radiologist.getByText(/sent back by .*Try the larger FOV first\./)).toBeVisible();

  await page.reload();
  await expect(page.getByText(/sent back by .*Try the larger FOV first\./)).toBeVisible();
  await release.click();
  await expect(page.getByRole('heading', { name: 'Waits for a radiologist’s sign-off' })).toBeVisible();
  await radiologist.reload();
  await radiologist.getByRole('button', { name: 'Sign off version 1' }).press('Enter');
  await expect(radiologist.getByText('Plan, version 1, signed off')).toBeVisible();
  await radiologist.context().close();

  await page.goto(planUrl);
  // Everything is filled in as planned: what was seen, and record.
  await page.getByText('None', { exact: true }).click();
  // The same by keys: on to the next answer, back again, and record.
  const none = page.getByRole('radio', { name: 'None', exact: true });
  await none.press('ArrowRight');
  await expect(none).not.toBeChecked();
  await page.keyboard.press('ArrowLeft');
  await expect(none).toBeChecked();
  await page.getByRole('button', { name: 'Record the outcome; the plan becomes used' }).press('Enter');
  await expect(page.getByText('Plan, version 1, used')).toBeVisible();
  await expect(page.locator('[data-outcome="none"]')).toContainText('as planned');
  await expect(page.getByRole('button', { name: /for use|draft/ })).toHaveCount(0);

  await page.goto(`/bookings/${booking.id}`);
  await expect(page.locator('[data-outcome="none"]')).toContainText('No wrap seen');
});

test('two versions side by side say what changed, with both verdicts', async ({ signedIn }) => {
  const page = await signedIn('radiographer');
  const booking = await newBooking(page.context(), 9102);
  await page.goto(`/bench/${booking.id}`);
  await benchAnswers(page);
  await page.getByRole('button', { name: 'Save plan' }).click();
  await expect(page.getByText('Saved: draft, version 1')).toBeVisible();
  await page.locator('[data-remedy]').first().getByRole('button', { name: /^Adopt/ }).press('Enter');
  await page.getByRole('button', { name: 'Save plan' }).press('Enter');
  await expect(page.getByText('Saved: draft, version 2')).toBeVisible();

  await page.goto(`/bookings/${booking.id}`);
  await page.getByRole('link', { name: 'Open the plan' }).click();
  await page.getByRole('link', { name: 'Two versions side by side' }).click();
  const verdicts = page.getByRole('table', { name: 'Verdict of each sequence in both versions' });
  await expect(verdicts.getByRole('row', { name: /Fold in the keep-clear area (No fold expected|Fold outside the keep-clear area)/ }).first()).toBeVisible();
  const changes = page.getByRole('table', { name: 'Fields that differ, before and after' });
  await expect(changes.getByRole('row', { name: /^Adopted none / })).toBeVisible();
  await page.getByLabel('Before', { exact: true }).selectOption('2');
  await expect(page.getByText('Nothing: both versions hold the same values.')).toBeVisible();
});
