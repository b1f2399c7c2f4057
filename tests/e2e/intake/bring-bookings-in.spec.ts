import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import type { Page } from '@playwright/test';
import { expect, test } from '@/tests/support/e2e/journey';

const CSV = fileURLToPath(new URL('../../../fixtures/files/bookings/demo-bookings.csv', import.meta.url));

/** Everything in the file that no column of ours is matched to: names, birth dates, remarks. */
function plantedTexts(): string[] {
  const text = readFileSync(CSV, 'utf8');
  const names = [...text.matchAll(/^\ufeff?"([^"]+), ([^"]+)"/gm)].flatMap(([, last, first]) => [last!, first!]);
  const births = [...text.matchAll(/";(\d{1,2}\.\d{1,2}\.19\d{2});HB/g)].map(([, birth]) => birth!);
  return [...new Set([...names, ...births, 'do not tell her sister', 'claustrophobic', 'interpreter', 'second line', '12.04.1961'])];
}

/** Every body the browser sends from now on, from the page and from its workers. */
function recordBodies(page: Page): string[] {
  const bodies: string[] = [];
  page.context().on('request', (request) => bodies.push(`${request.url()}\n${request.postData() ?? ''}`));
  return bodies;
}

const count = async (page: Page, words: RegExp) => page.getByRole('status').filter({ hasText: words }).textContent();

test('a file of 300 rows is matched, compared and booked, and nothing that is not matched leaves the browser', async ({ signedIn }) => {
  const page = await signedIn('coordinator');
  await page.goto('/bookings/import');
  const bodies = recordBodies(page);
  await page.getByLabel('Choose a CSV file or a FHIR bundle').setInputFiles(CSV);

  await expect(page.getByLabel('Accession number', { exact: true })).toHaveValue('Accession number');
  await expect(page.getByLabel('Weight', { exact: true })).toHaveValue('Weight (lb)');
  await expect(page.getByLabel('Unit of Weight')).toHaveValue('lb');
  await expect(page.getByLabel('Unit of Girth at the iliac crest')).toHaveValue('in');
  await page.getByLabel('Slot, minutes').selectOption('Minutes');
  await page.getByLabel('Scanner', { exact: true }).selectOption('Room');
  await page.getByLabel('Protocol', { exact: true }).selectOption('Exam');
  for (const [name, nth] of [[/^room\s+1$/i, 1], [/^room\s+2$/i, 2], [/^Abdo$/, 1], [/^Pelvis$/, 2]] as const) {
    await page.getByLabel(name).selectOption({ index: nth });
  }
  const compare = page.getByRole('button', { name: 'Compare with the bookings' });
  await compare.click();
  const told = await count(page, /left out/);
  // Of the traps in the file (see its writer) these rows cannot be booked: 10, 20, 30, 40, 50, 60, 70, 80, 100, 130, 140, 150.
  expect(told).toMatch(/12 left out/);
  await page.getByText('Left out 12').click();
  const table = page.getByRole('region', { name: 'What the file will do, row by row' });
  await expect(table.getByRole('row')).toHaveCount(13);
  const shown = (await table.textContent()) ?? '';
  for (const text of plantedTexts()) expect(shown).not.toContain(text);

  await page.getByRole('button', { name: /^Book \d+ rows$/ }).click();
  await expect(page.getByText(/^\d+ booked, \d+ changed$/)).toBeVisible();

  // The same file again changes nothing, and how it is read was kept.
  await page.getByRole('button', { name: 'Bring in another file' }).click();
  await page.goto('/bookings/import');
  await page.getByLabel('Choose a CSV file or a FHIR bundle').setInputFiles(CSV);
  await expect(page.getByLabel('Scanner', { exact: true })).toHaveValue('Room');
  await compare.click();
  await expect(page.getByText(/^0 new, 0 changed, 288 the same as booked, 12 left out$/)).toBeVisible();
  await expect(page.getByRole('button', { name: 'Book 0 rows' })).toBeDisabled();

  // The record really holds what was sent: the matched cells are in it, and nothing else of the file.
  const sent = bodies.join('\n');
  expect(sent).toContain('HB-4000');
  expect(sent).toMatch(/"quantity":"weight-kg"/);
  for (const text of plantedTexts()) expect(sent, text).not.toContain(text);
});
