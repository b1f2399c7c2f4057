import { expect, test } from '@/tests/support/e2e/journey';

test('four fields on the home page, without an account, give the engine’s answer and list what was assumed', async ({ page }) => {
  const sent: string[] = [];
  page.on('request', (request) => {
    if (request.method() !== 'GET') sent.push(`${request.method()} ${request.url()}`);
  });
  await page.goto('/');
  const check = page.getByRole('region', { name: 'Quick check' });
  expect(await check.getByRole('spinbutton').count() + (await check.getByRole('combobox').count())).toBeLessThanOrEqual(4);
  await expect(check.locator('[data-verdict]')).toHaveText('Fold in the keep-clear area');
  await expect(check.getByText(/^Cheapest remedy: /)).toBeVisible();

  await check.getByRole('spinbutton', { name: 'Phase oversampling at present' }).fill('12');
  await expect(check.locator('[data-verdict]')).toHaveText('No fold expected');
  await check.getByRole('spinbutton', { name: 'FOV along phase' }).fill('12');
  await expect(check.getByText('12 is too small; allowed: 50 to 600 mm.')).toBeVisible();
  await check.getByRole('spinbutton', { name: 'FOV along phase' }).fill('320');
  await check.getByRole('combobox', { name: 'Sequence' }).selectOption('balanced');
  await expect(check.locator('[data-assumed="Phase direction"]')).toContainText('right–left, coronal');
  const edges = await check.locator('[data-assumed]').evaluateAll((all) => all.map((each) => getComputedStyle(each).borderBottomStyle));
  expect(edges.length).toBeGreaterThan(10);
  expect([...new Set(edges)]).toEqual(['dotted']);
  expect(sent, 'nothing typed leaves the page').toEqual([]);
});

test('signed in, it is one press from today and works by keyboard alone', async ({ signedIn }) => {
  const page = await signedIn('coordinator');
  await page.goto('/today');
  await page.getByRole('link', { name: 'Quick check' }).click();
  const field = page.getByRole('spinbutton', { name: 'Phase oversampling at present' });
  await field.focus();
  await expect(page.locator('[data-verdict]')).toHaveText('Fold in the keep-clear area');
  for (let press = 0; press < 2; press += 1) await page.keyboard.press('Shift+ArrowUp');
  await expect(field).toHaveValue('20');
  await expect(page.locator('[data-verdict]')).toHaveText('No fold expected');
});
