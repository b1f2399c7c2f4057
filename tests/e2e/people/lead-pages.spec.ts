import { randomUUID } from 'node:crypto';
import AxeBuilder from '@axe-core/playwright';
import { expect, test } from '@/tests/support/e2e/journey';

const PAGES = ['/site/people', '/site/people/invite', '/site/tokens', '/site/tokens/new', '/site/audit'];

test('people, tokens and the audit log look missing to everyone but leads', async ({ signedIn, expectedErrors }) => {
  expectedErrors.push(/404/);
  const page = await signedIn('radiographer');
  const texts = new Set<string>();
  for (const path of [...PAGES, `/site/people/${randomUUID()}`, '/site/no-such-page']) {
    await page.goto(path);
    await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
    texts.add(await page.getByRole('heading', { level: 1 }).innerText());
  }
  expect([...texts]).toHaveLength(1);
});

test('a token is made, shown once, listed, and revoked', async ({ signedIn }) => {
  const page = await signedIn('lead');
  const name = `Booking system ${randomUUID().slice(0, 8)}`;
  await page.goto('/site/tokens/new');
  await page.getByLabel('Name', { exact: true }).fill(name);
  await page.getByRole('button', { name: 'Make the token' }).click();
  await expect(page.getByText('Choose at least one thing the token may do.')).toBeVisible();
  await expect(page.getByLabel('Name', { exact: true })).toHaveValue(name);
  await page.getByLabel('check:run').check();
  await page.getByRole('radio', { name: '30 days' }).check();
  await page.getByRole('button', { name: 'Make the token' }).click();
  const secret = await page.getByLabel('Token', { exact: true }).inputValue();
  expect(secret).toMatch(/^selvedge_[\w-]{43}$/);

  await page.getByRole('link', { name: 'Done, I have kept it' }).click();
  const row = page.getByRole('row').filter({ hasText: name });
  await expect(row).toContainText('Works');
  expect(await page.content()).not.toContain(secret);
  await row.getByRole('button', { name: 'Revoke' }).click();
  await page.keyboard.press('Escape');
  await expect(row.getByRole('button', { name: 'Revoke', exact: true })).toBeFocused();
  await page.keyboard.press('Enter');
  await row.getByRole('button', { name: `Revoke “${name}”` }).click();
  await expect(row).toContainText('Revoked');

  await page.goto('/site/audit?action=api-token.revoke');
  await expect(page.getByRole('row').filter({ hasText: 'api-token.revoke' }).first()).toContainText('revokedAt');
});

test('the audit log is filtered by its address', async ({ signedIn }) => {
  const page = await signedIn('lead');
  await page.goto('/site/audit');
  await page.getByLabel('Action').selectOption('account.sign-in');
  await page.getByRole('button', { name: 'Show', exact: true }).click();
  await expect(page).toHaveURL(/action=account\.sign-in/);
  await expect(page.getByRole('row').nth(1)).toContainText('account.sign-in');
  await expect(page.getByLabel('Action')).toHaveValue('account.sign-in');
  await page.goBack();
  await expect(page.getByLabel('Action')).toHaveValue('');
});

for (const path of [...PAGES, '/account']) {
  test(`${path} has no fault an accessibility checker finds, in either theme, and fits a phone`, async ({ signedIn }) => {
    const page = await signedIn('lead');
    for (const colorScheme of ['light', 'dark'] as const) {
      await page.emulateMedia({ colorScheme });
      await page.goto(path);
      await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
      const { violations } = await new AxeBuilder({ page }).analyze();
      expect(violations.map(({ id, nodes }) => `${id}: ${nodes[0]?.html}`)).toEqual([]);
    }
    await page.setViewportSize({ width: 390, height: 844 });
    const overflow = await page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);
    expect(overflow).toBe(0);
  });
}
