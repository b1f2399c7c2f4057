import AxeBuilder from '@axe-core/playwright';
import type { Page } from '@playwright/test';
import { expect, test } from '@/tests/support/e2e/journey';

const PAGES = [
  '/today',
  '/bookings',
  '/bookings/new',
  '/bookings/import',
  '/bookings/week',
  '/bookings/moves',
  '/bookings/sessions',
  '/site',
  '/site/scanners',
  '/site/scanners/new',
  '/site/protocols',
  '/site/protocols/new',
  '/site/policy',
  '/site/details',
  '/site/mail',
  '/size',
  '/account',
];

async function setTheme(page: Page, theme: 'day' | 'control-room', url: string): Promise<void> {
  await page.context().addCookies([{ name: 'selvedge-theme', value: theme, url }]);
}

async function expectNoViolations(page: Page, path: string): Promise<void> {
  await page.goto(path);
  await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
  const { violations } = await new AxeBuilder({ page }).analyze();
  expect(
    violations.map(({ id, nodes }) => ({ id, where: nodes.map((node) => node.target.join(' ')) })),
    path,
  ).toEqual([]);
  const wider = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
  expect(wider, `${path} scrolls sideways`).toBeLessThanOrEqual(0);
}

/** What is behind the last entry of each list: a scanner, a protocol, a booking. */
const LISTS = [
  { list: '/site/scanners', entry: '/site/scanners/' },
  { list: '/site/protocols', entry: '/site/protocols/' },
  { list: '/today', entry: '/bookings/' },
];

// Colours differ by theme and layout by width; the two do not mix, so three of the four pairs say all.
for (const [theme, width] of [['day', 1440], ['control-room', 1440], ['day', 390]] as const) {
  test(`every page passes axe and fits, ${theme}, ${width} px wide`, async ({ signedIn, baseURL, expectedErrors }) => {
    // Some two dozen pages, each searched whole.
    test.setTimeout(240_000);
    expectedErrors.push(/404/);
    const page = await signedIn('lead');
    await page.setViewportSize({ width, height: 900 });
    await setTheme(page, theme, baseURL!);
    for (const path of PAGES) await expectNoViolations(page, path);
    for (const { list, entry } of LISTS) {
      await page.goto(list);
      const link = page.locator(`main :is(table, ul) a[href^="${entry}"]`).last();
      await expectNoViolations(page, (await link.getAttribute('href'))!.split('#')[0]!);
    }
    await expectNoViolations(page, '/site/no-such-page');
    await expectNoViolations(page, '/');
  });
}

test('a chosen theme is in the server’s own answer, so nothing flashes; the device decides otherwise', async ({
  page,
  request,
}) => {
  await page.goto('/');
  const ground = () => page.evaluate(() => getComputedStyle(document.body).backgroundColor);
  await page.emulateMedia({ colorScheme: 'light' });
  const day = await ground();
  await page.emulateMedia({ colorScheme: 'dark' });
  const night = await ground();
  expect(night).not.toBe(day);

  await page.getByRole('button', { name: /^Theme:/ }).click();
  await page.getByRole('menuitemradio', { name: 'Day' }).click();
  expect(await ground()).toBe(day);
  const cookie = (await page.context().cookies()).find(({ name }) => name === 'selvedge-theme');
  expect(cookie?.value).toBe('day');
  const html = await (
    await request.get('/', { headers: { cookie: `selvedge-theme=${cookie!.value}` } })
  ).text();
  expect(html).toMatch(/<html[^>]*data-theme="day"/);
  expect(await (await request.get('/')).text()).not.toMatch(/<html[^>]*data-theme/);

  await page.reload();
  expect(await ground()).toBe(day);
  await page.getByRole('button', { name: /^Theme:/ }).click();
  await page.getByRole('menuitemradio', { name: 'As this device' }).click();
  expect(await ground()).toBe(night);
});

test('the first Tab leads past the header, and focus can be seen', async ({ signedIn }) => {
  const page = await signedIn('radiographer');
  await page.goto('/today');
  await page.keyboard.press('Tab');
  const skip = page.getByRole('link', { name: 'Skip to the content' });
  await expect(skip).toBeFocused();
  await expect(skip).toBeInViewport();
  expect(await skip.evaluate((link) => getComputedStyle(link).outlineStyle)).toBe('solid');
  await page.keyboard.press('Enter');
  await expect(page.locator('main')).toBeFocused();
});
