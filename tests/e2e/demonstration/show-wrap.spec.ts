import { readFile } from 'node:fs/promises';
import AxeBuilder from '@axe-core/playwright';
import type { Page } from '@playwright/test';
import { appRoutes } from '@/tests/support/e2e/app-routes';
import { expect, test } from '@/tests/support/e2e/journey';

/** What answers anybody: front page, sign-in and links of its own kind, and the description of the API. */
const FOR_ANYBODY = /^\/$|^\/(sign-in|set-password|size)(\/|$)|^\/api\/auth\/|^\/api\/v1\/openapi\.json$/;

/** Colours differ by theme: both are looked at. */
async function expectAccessible(page: Page, where: string): Promise<void> {
  for (const colorScheme of ['light', 'dark'] as const) {
    await page.emulateMedia({ colorScheme });
    const { violations } = await new AxeBuilder({ page }).analyze();
    expect(violations.map(({ id, nodes }) => ({ id, where: nodes.map((node) => node.target.join(' ')) })), `${where}, ${colorScheme}`).toEqual([]);
  }
  await page.emulateMedia({ colorScheme: null });
  const wider = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
  expect(wider, `${where} scrolls sideways`).toBeLessThanOrEqual(0);
}

/** An educator builds, presents with the presenter's window, shares, and takes the link back. */
test('three scenes from set piece and bench, presented, shared, moved, revoked', async ({ signedIn, browser, baseURL, expectedErrors }) => {
  // The opened presentation goes on without the network; what the browser then says of it is no fault.
  expectedErrors.push(/ERR_INTERNET_DISCONNECTED/);
  expectedErrors.push(/status of 404/);
  test.setTimeout(240_000);
  const page = await signedIn('educator');
  const title = `Wrap, shown ${Date.now()}`;

  await test.step('build three scenes', async () => {
    await page.goto('/demonstrations');
    await expectAccessible(page, 'the list');
    await page.getByRole('listitem').filter({ hasText: 'Wrap between the ends' }).getByRole('button', { name: 'Copy' }).click();
    await page.waitForURL(/\/demonstrations\/[0-9a-f-]{36}$/);
    const name = page.getByLabel('Title of the demonstration');
    await name.fill(title);
    const scenes = page.getByRole('list', { name: 'Scenes' });
    for (let taken = 0; taken < 3; taken += 1) {
      await scenes.getByRole('button', { name: /^\d/ }).last().click();
      await page.getByRole('button', { name: 'Take out' }).click();
    }
    // The order is changed by keys and changed back.
    const first = scenes.getByRole('button', { name: /^1 The dome/ });
    await first.focus();
    await page.keyboard.press('Alt+ArrowDown');
    await expect(scenes.getByRole('button', { name: /^2 The dome/ })).toBeVisible();
    await page.keyboard.press('Alt+ArrowUp');
    await expect(first).toBeVisible();
    // The same by dragging.
    const entry = (words: string) => scenes.getByRole('listitem').filter({ hasText: words });
    await entry('The dome').dragTo(entry('12.5 % slice'));
    await expect(scenes.getByRole('button', { name: /^2 The dome/ })).toBeVisible();
    await entry('The dome').dragTo(entry('12.5 % slice'));
    await expect(first).toBeVisible();
    await expect(page.getByText('All changes are saved.')).toBeVisible();
  });
  const address = page.url();

  await test.step('add a third from the bench', async () => {
    await page.goto('/bench');
    await page.getByRole('button', { name: 'Add to a demonstration' }).click();
    await page.getByLabel('Demonstration', { exact: true }).selectOption({ label: title });
    await page.getByLabel('Title of the scene').fill('As on the bench');
    await page.getByRole('button', { name: 'Add the scene' }).click();
    await expect(page.getByRole('link', { name: `“${title}”` })).toBeVisible();
  });

  await test.step('present by keyboard with the presenter’s window', async () => {
    await page.goto(`${address}/present`);
    const [presenter] = await Promise.all([
      page.waitForEvent('popup'),
      page.getByRole('button', { name: 'Start with the presenter’s window' }).click(),
    ]);
    await expect(presenter.locator('[data-presenter-scene="1"]')).toBeVisible();
    await expect(presenter.locator('[data-presenter-note]')).toContainText('partitions hold it');
    await expect(presenter.getByRole('region', { name: 'Next scene' })).toContainText('12.5 % slice oversampling');
    await expectAccessible(presenter, 'the presenter’s window');
    await page.bringToFront();
    await expectAccessible(page, 'the room');
    await page.keyboard.press('PageDown');
    await expect(page.locator('[data-scene="2"]')).toBeVisible();
    await expect(presenter.locator('[data-presenter-scene="2"]')).toBeVisible();
    // Numbers are on their way for half a second, and for nobody who asked for less motion.
    const seen = (steps: string) =>
      page.evaluate(
        (key) =>
          new Promise<number>((resolve) => {
            const figure = document.querySelector('[data-figure="contaminated"]')!;
            const values = new Set([figure.textContent]);
            const look = new MutationObserver(() => values.add(figure.textContent));
            look.observe(figure, { characterData: true, childList: true, subtree: true });
            window.dispatchEvent(new KeyboardEvent('keydown', { key }));
            setTimeout(() => (look.disconnect(), resolve(values.size)), 900);
          }),
        steps,
      );
    expect(await seen('PageUp')).toBeGreaterThan(2);
    await page.emulateMedia({ reducedMotion: 'reduce' });
    expect(await seen('PageDown')).toBe(2);
    await page.emulateMedia({ reducedMotion: null });
    // Opened, it needs no network.
    await page.context().setOffline(true);
    await page.keyboard.press('ArrowRight');
    await expect(page.getByRole('heading', { name: 'As on the bench' })).toBeVisible();
    // Dark while the room looks at the presenter, from either window; a step brings the picture back.
    await page.keyboard.press('b');
    await expect(page.locator('[data-blank]')).toBeVisible();
    await presenter.getByRole('button', { name: 'Bring the screen back' }).click();
    await expect(page.locator('[data-blank]')).toHaveCount(0);
    await page.keyboard.press('PageUp');
    await page.keyboard.press('ArrowLeft');
    await expect(presenter.locator('[data-presenter-scene="1"]')).toBeVisible();
    await page.context().setOffline(false);
    await presenter.close();
  });

  await test.step('save a scene and hand all of them out', async () => {
    await page.goto(address);
    await expect(page.getByText('All changes are saved.')).toBeVisible();
    await expectAccessible(page, 'the builder');
    for (const [kind, starts] of [['SVG', '<svg xmlns'], ['PNG', '\x89PNG']] as const) {
      const [download] = await Promise.all([page.waitForEvent('download'), page.getByRole('button', { name: `Save as ${kind}` }).click()]);
      expect(download.suggestedFilename()).toBe(`scene-1.${kind.toLowerCase()}`);
      const bytes = await readFile(await download.path(), 'latin1');
      expect(bytes.slice(0, starts.length)).toBe(starts);
      // Drawn, with its colours written out: an empty picture is a tenth of this.
      expect(bytes.length).toBeGreaterThan(20_000);
      expect(bytes).not.toContain('var(--');
    }
    await page.getByRole('button', { name: 'Make a hand-out as PDF, A4' }).click();
    const ready = page.getByRole('link', { name: /^Download the hand-out as PDF, A4/ });
    await expect(ready).toBeVisible({ timeout: 60_000 });
    const file = await page.request.get((await ready.getAttribute('href'))!);
    expect(file.headers()['content-disposition']).toBe('attachment; filename="hand-out.pdf"');
    expect((await file.body()).subarray(0, 5).toString()).toBe('%PDF-');
  });

  await test.step('share, open signed out, move a control, revoke', async () => {
    await page.goto(address);
    await page.getByRole('button', { name: 'Make a link' }).click();
    const link = await page.getByLabel('Link to the demonstration').inputValue();
    const stranger = await browser.newContext({ baseURL });
    const seen = await stranger.newPage();
    await seen.goto(link);
    await expect(seen.getByRole('heading', { name: 'The dome of the liver at the feet end' })).toBeVisible();
    await expectAccessible(seen, 'the shared page');
    const count = seen.locator('[data-figure="contaminated"]');
    const before = await count.innerText();
    await seen.getByLabel('Slice oversampling', { exact: true }).fill('12');
    await expect(count).not.toHaveText(before);
    expect(await seen.content()).not.toContain('partitions hold it');
    // Nothing else opens with it: every page and route there is, asked with all that the link's holder has.
    const secret = link.split('/').at(-1)!;
    const id = address.split('/').at(-1)!;
    const routes = appRoutes((name) => (name === 'token' ? secret : name === 'nextauth' ? 'session' : id));
    expect(routes.length).toBeGreaterThan(60);
    const headers = { authorization: `Bearer ${secret}`, cookie: `next-auth.session-token=${secret}` };
    for (const { address: path, methods } of routes.filter((route) => route.address !== `/shown/${secret}` && !FOR_ANYBODY.test(route.address))) {
      for (const method of methods) {
        const answer = await stranger.request.fetch(path, { method, headers, maxRedirects: 0, ...(method === 'GET' ? {} : { data: {} }) });
        const where = answer.headers().location ?? '';
        const signIn = answer.status() === 307 && new URL(where, answer.url()).pathname === '/sign-in';
        expect(signIn || [401, 403, 404].includes(answer.status()), `${method} ${path}: ${answer.status()} ${where}`).toBe(true);
        expect(await answer.text()).not.toContain(title);
      }
    }
    // Nor is anything in the page that is not shown: no id of a row, no site, no author.
    const again = await stranger.request.get(link);
    expect(again.headers()).toMatchObject({ 'referrer-policy': 'no-referrer', 'cache-control': 'no-store', 'x-robots-tag': 'noindex, nofollow' });
    const sent = await again.text();
    for (const trace of [id, 'Harbour MRI', 'siteId', 'partitions hold it']) expect(sent).not.toContain(trace);

    await page.reload();
    await expect(page.getByText('Opened 2 times.')).toBeVisible();
    await page.getByRole('button', { name: 'Revoke', exact: true }).click();
    await page.getByRole('button', { name: 'Revoke the link' }).click();
    await expect(page.getByText('is revoked')).toBeVisible();
    expect((await stranger.request.get(link)).status()).toBe(404);
    // What a router would fetch of the opened page is the same 404.
    const routers: Record<string, string>[] = [{ rsc: '1' }, { rsc: '1', 'next-router-prefetch': '1' }, { 'next-router-prefetch': '1' }];
    for (const headers of routers) {
      const fetched = await stranger.request.get(link, { headers });
      expect(fetched.status(), JSON.stringify(headers)).toBe(404);
      expect(await fetched.text()).not.toContain('prescription');
    }
    await seen.reload();
    await expect(seen.getByRole('heading', { name: 'The dome of the liver at the feet end' })).toHaveCount(0);
    expect((await stranger.request.get(`/shown/${'A'.repeat(43)}`)).status()).toBe(404);
    await stranger.close();
  });

  await test.step('put away and bring back', async () => {
    await page.goto('/demonstrations');
    const line = page.getByRole('list', { name: 'Demonstrations' }).getByRole('listitem').filter({ hasText: title });
    await line.getByRole('button', { name: `Put away “${title}”` }).click();
    await line.getByRole('button', { name: `Put “${title}” away` }).click();
    await expect(line).toHaveCount(0);
    await page.getByText(/put away$/).click();
    await page.getByRole('button', { name: `Bring back “${title}”` }).click();
    await expect(line).toBeVisible();
  });
});
