import type { Page } from '@playwright/test';
import { expect, test } from '@/tests/support/e2e/journey';
import { benchAnswers, sceneNodes } from '@/tests/support/e2e/bench-page';

const group = (page: Page, title: string) => page.locator('.bench-group').getByRole('button', { name: title, exact: true });

test('a presaturation band is added, edited, taken back and removed', async ({ signedIn }) => {
  const page = await signedIn('radiographer');
  await page.goto('/bench');
  await benchAnswers(page);
  await group(page, 'Presaturation').click();
  await page.getByRole('button', { name: 'Add a band' }).click();
  const band = page.getByRole('group', { name: /^Band 1, / });
  const thick = band.getByRole('spinbutton', { name: 'Thick' });
  await expect(thick).toHaveValue('60');
  await thick.fill('80');
  await thick.blur();
  await band.getByLabel('Band 1', { exact: true }).selectOption('anterior');
  await expect(page.getByRole('group', { name: 'Band 1, anterior' })).toBeVisible();
  await page.getByRole('button', { name: 'Undo' }).click();
  await expect(page.getByRole('group', { name: 'Band 1, posterior' }).getByRole('spinbutton', { name: 'Thick' })).toHaveValue('80');

  await thick.fill('9000');
  await expect(band.getByText('9000 is too large; allowed: 1 to 500 mm.')).toBeVisible();
  await thick.fill('70');
  await page.getByRole('button', { name: 'Remove band 1, posterior' }).click();
  await expect(page.getByRole('group', { name: /^Band 1, / })).toHaveCount(0);
  await group(page, 'Window').click();
  await expect(page.locator('.bench-group', { hasText: 'Presaturation' })).toContainText('none');
});

test('what the protocol does not tell about the slab pulse can be left not known, or told', async ({ signedIn }) => {
  const page = await signedIn('radiographer');
  await page.goto('/bench');
  await benchAnswers(page);
  await page.getByRole('button', { name: /T1 3D gradient echo/ }).click();
  await benchAnswers(page);
  // The group of what is changed first in a 3D sequence lies open by itself.
  const product = page.getByRole('combobox', { name: 'Time-bandwidth product' });
  await expect(product).toBeVisible();
  await product.selectOption('not known');
  await expect(page.getByText('A cautious value of the site’s policy stands in.')).toBeVisible();
  await expect(page.getByRole('spinbutton', { name: 'Time-bandwidth product' })).toHaveCount(0);
  await product.selectOption('known');
  const typed = page.getByRole('spinbutton', { name: 'Time-bandwidth product' });
  await typed.fill('6.5');
  await expect(page.getByRole('slider', { name: 'Time-bandwidth product, slider' })).toHaveAttribute('aria-valuenow', '6.5');
});

test('more anatomy can be made to stay displayed, typed by its edges', async ({ signedIn }) => {
  const page = await signedIn('radiographer');
  await page.goto('/bench');
  await benchAnswers(page);
  await page.getByRole('checkbox', { name: 'More must stay displayed' }).check();
  const edges = page.getByRole('group', { name: 'Must stay displayed' });
  await edges.getByRole('spinbutton', { name: 'Anterior' }).fill('120');
  await expect.poll(() => sceneNodes(page, 'section')).toContain('must-stay-displayed');
  await page.getByRole('checkbox', { name: 'More must stay displayed' }).uncheck();
  await expect.poll(() => sceneNodes(page, 'section')).not.toContain('must-stay-displayed');
});
