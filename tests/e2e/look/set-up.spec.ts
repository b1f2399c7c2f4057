import { randomUUID } from 'node:crypto';
import type { Page } from '@playwright/test';
import { expect, test } from '@/tests/support/e2e/journey';

const FIGURES: [string, string][] = [
  ['Field strength', '1,5'],
  ['Diameter of the opening', '700'],
  ['Table below the opening’s centre', '170'],
  ['Room the front coil takes', '30'],
  ['Table load limit', '250'],
  ['Largest FOV that can be entered', '500'],
  ['Usable, right–left', '500'],
  ['Usable, up–down', '500'],
  ['Usable, along the bore', '450'],
];

const field = (page: Page, label: string) => page.getByLabel(label, { exact: true }).first();

test('a lead adds a scanner: what is missing is said beside each field, what was typed stays', async ({
  signedIn,
}) => {
  const page = await signedIn('lead');
  const name = `Quay ${randomUUID().slice(0, 8)}`;
  await page.goto('/site/scanners/new');
  await field(page, 'Name').fill(name);
  await field(page, 'Diameter of the opening').fill('12000');
  await page.getByRole('button', { name: 'Add this scanner' }).click();
  await expect(page.getByText('12000 is too large; allowed: 300 to 1200 mm.')).toBeVisible();
  await expect(page.getByText('The scanner was not saved: 9 fields need another look.')).toBeVisible();
  await expect(field(page, 'Diameter of the opening')).toHaveValue('12000');
  await expect(field(page, 'Name')).toHaveValue(name);

  for (const [label, value] of FIGURES) await field(page, label).fill(value);
  await page.getByLabel('Phase oversampling is set as').selectOption('a doubling switch');
  await expect(page.getByLabel('Acquired lines go in')).toHaveValue('doubling');
  await page.getByRole('button', { name: 'Add this scanner' }).click();
  await expect(page).toHaveURL(/\/site\/scanners$/);
  const row = page.getByRole('row').filter({ hasText: name });
  await expect(row).toContainText('a doubling switch');
  await expect(row).toContainText('1.5');

  await row.getByRole('link', { name }).click();
  await expect(field(page, 'Field strength')).toHaveValue('1.5');
  await field(page, 'Table load limit').press('Shift+ArrowUp');
  await expect(field(page, 'Table load limit')).toHaveValue('260');
  await page.getByRole('button', { name: 'Save as version 2' }).click();
  await expect(page).toHaveURL(/\/site\/scanners$/);
  await page.getByRole('link', { name }).click();
  await expect(page.getByRole('row').filter({ hasText: 'Version 2' })).toContainText(
    'Table load limit: 250 → 260',
  );

  await page.getByRole('link', { name: 'Version 1' }).click();
  await expect(page.getByText('This is version 1. The newest is version 2.')).toBeVisible();
  await expect(field(page, 'Table load limit')).toHaveValue('250');
  await expect(page.getByRole('button', { name: /^Save/ })).toHaveCount(0);
});

test('two leads edit one protocol: the later one is told, loses nothing and can save both', async ({
  signedIn,
  context,
}) => {
  const page = await signedIn('lead');
  const name = `Liver ${randomUUID().slice(0, 8)}`;
  await page.goto('/site/protocols/new');
  await field(page, 'Name').fill(name);
  await page.getByLabel('Starts from').selectOption('Liver');
  await page.getByLabel('Name', { exact: true }).nth(1).fill('T2 axial');
  await page.getByRole('button', { name: 'Add this protocol' }).click();
  await page.getByRole('link', { name }).click();
  await expect(page.getByRole('heading', { level: 1, name })).toBeVisible();

  const other = await context.newPage();
  await other.goto(page.url());
  await other.getByRole('button', { name: 'Timing and breathing' }).click();
  await field(other, 'TE').fill('82');
  await other.getByRole('button', { name: 'Save as version 2' }).click();
  await expect(other).toHaveURL(/\/site\/protocols$/);

  await field(page, 'FOV, phase').fill('310');
  await page.getByRole('button', { name: 'Save as version 2' }).click();
  await expect(
    page.getByText('Someone else saved version 2 while you were editing version 1.'),
  ).toBeVisible();
  await expect(field(page, 'FOV, phase')).toHaveValue('310');
  await page.getByRole('button', { name: 'Save both as version 3' }).click();
  await expect(page).toHaveURL(/\/site\/protocols$/);
  await page.getByRole('link', { name }).click();
  await expect(field(page, 'FOV, phase')).toHaveValue('310');
  await page.getByRole('button', { name: 'Timing and breathing' }).click();
  await expect(field(page, 'TE')).toHaveValue('82');
});

test('a radiographer reads a protocol and can change nothing', async ({ signedIn }) => {
  const page = await signedIn('radiographer');
  await page.goto('/site/protocols');
  await page.getByRole('main').getByRole('row').nth(1).getByRole('link').click();
  await expect(page.getByText('A lead of your site can change it.')).toBeVisible();
  await page.getByRole('button', { name: /^1\. / }).click();
  await expect(field(page, 'FOV, phase')).toBeDisabled();
  await expect(page.getByRole('button', { name: /^(Save|Add|Remove|Take)/ })).toHaveCount(0);
});
