import AxeBuilder from '@axe-core/playwright';
import { accountOf, expect, test } from '@/tests/support/e2e/journey';
import { linkIn, mailTo } from '@/tests/support/e2e/mail';

test('signing in leads back to where the person was going, keeps what was typed, and works by keyboard', async ({
  page,
  expectedErrors,
}) => {
  expectedErrors.push(/401/);
  const { email, password } = await accountOf('coordinator');
  await page.goto('/account');
  await expect(page).toHaveURL(/\/sign-in\?callbackUrl=%2Faccount$/);

  await page.getByLabel('E-mail address').focus();
  await page.keyboard.type('coordinator');
  await page.keyboard.press('Enter');
  await expect(page.getByText('This is not an e-mail address')).toBeVisible();
  await expect(page.getByLabel('E-mail address')).toBeFocused();

  await page.keyboard.press('ControlOrMeta+a');
  await page.keyboard.type(email);
  await page.keyboard.press('Tab');
  await page.keyboard.type('not the password at all');
  await page.keyboard.press('Enter');
  await expect(page.getByText('E-mail address and password do not belong together.')).toBeVisible();
  await expect(page.getByLabel('E-mail address')).toHaveValue(email);

  await page.getByLabel('Password').focus();
  await page.keyboard.press('ControlOrMeta+a');
  await page.keyboard.type(password);
  await page.keyboard.press('Enter');
  await expect(page).toHaveURL(/\/account$/);
});

test('a forged return address ends at home', async ({ page }) => {
  const { email, password } = await accountOf('radiologist');
  for (const evil of ['//evil.example', 'https://evil.example/', '/\\evil.example']) {
    await page.context().clearCookies();
    await page.goto(`/sign-in?callbackUrl=${encodeURIComponent(evil)}`);
    await page.getByLabel('E-mail address').fill(email);
    await page.getByLabel('Password').fill(password);
    await page.getByRole('button', { name: 'Sign in' }).click();
    await expect(page.getByRole('navigation', { name: 'Main' })).toBeVisible();
    expect(new URL(page.url()).hostname).toBe('127.0.0.1');
  }
});

test('a forgotten password is mended by mail, in the same words for strangers', async ({ page }) => {
  const { email } = await accountOf('educator');
  for (const address of ['nobody@people.example', email]) {
    await page.goto('/sign-in');
    await page.getByRole('link', { name: 'Forgotten your password?' }).click();
    // Both pages have a field of this name: fill the second page's.
    await expect(page.getByRole('heading', { name: 'New password' })).toBeVisible();
    await page.getByLabel('E-mail address').fill(address);
    await page.getByRole('button', { name: 'Mail me a link' }).click();
    await expect(page.getByText(`If ${address} has an account, a link`)).toBeVisible();
  }
  await page.goto(linkIn(await mailTo(email)));
  // Not used: the other journeys sign in with the password this account has.
  await expect(page.getByLabel('New password')).toBeVisible();
});

test('signing out ends the session and clears unsaved work', async ({ signedIn }) => {
  const page = await signedIn('radiologist');
  await page.goto('/account');
  await page.evaluate(() => sessionStorage.setItem('draft', 'unsaved'));
  await page.getByRole('button', { name: /your account/ }).click();
  await page.getByRole('menuitem', { name: 'Sign out', exact: true }).click();
  await expect(page.getByRole('link', { name: 'Sign in' }).first()).toBeVisible();
  expect(await page.evaluate(() => sessionStorage.length)).toBe(0);
  await page.goto('/account');
  await expect(page).toHaveURL(/\/sign-in/);
});

for (const path of ['/sign-in', '/sign-in/new-password', '/set-password', '/set-password#not-a-link']) {
  test(`${path} has no fault an accessibility checker finds, in either theme`, async ({ page }) => {
    for (const colorScheme of ['light', 'dark'] as const) {
      await page.emulateMedia({ colorScheme });
      await page.goto(path);
      await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
      const { violations } = await new AxeBuilder({ page }).analyze();
      expect(violations.map(({ id, nodes }) => `${id}: ${nodes[0]?.html}`)).toEqual([]);
    }
  });
}
