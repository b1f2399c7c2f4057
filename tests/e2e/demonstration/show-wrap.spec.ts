import { expect, test } from '@/tests/support/e2e/journey';

/** An educator builds, presents with the presenter's window, shares, and takes the link back. */
test('three scenes from set piece and bench, presented, shared, moved, revoked', async ({ signedIn, browser, baseURL, expectedErrors }) => {
  // The opened presentation goes on without the network; what the browser then says of it is no fault.
  expectedErrors.push(/ERR_INTERNET_DISCONNECTED/);
  test.setTimeout(240_000);
  const page = await signedIn('educator');
  const title = `Wrap, shown ${Date.now()}`;

  await test.step('build three scenes', async () => {
    await page.goto('/demonstrations');
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
    await expect(presenter.getByRole('region', { name: 'Next scene' })).toContainText('12 % slice oversampling');
    await page.bringToFront();
    await page.keyboard.press('PageDown');
    await expect(page.locator('[data-scene="2"]')).toBeVisible();
    await expect(presenter.locator('[data-presenter-scene="2"]')).toBeVisible();
    // Opened, it needs no network.
    await page.context().setOffline(true);
    await page.keyboard.press('ArrowRight');
    await expect(page.getByRole('heading', { name: 'As on the bench' })).toBeVisible();
    await page.keyboard.press('PageUp');
    await page.keyboard.press('ArrowLeft');
    await expect(presenter.locator('[data-presenter-scene="1"]')).toBeVisible();
    await page.context().setOffline(false);
    await presenter.close();
  });

  await test.step('share, open signed out, move a control, revoke', async () => {
    await page.goto(address);
    await page.getByRole('button', { name: 'Make a link' }).click();
    const link = await page.locator('[data-share-address]').innerText();
    const stranger = await browser.newContext({ baseURL });
    const seen = await stranger.newPage();
    await seen.goto(link);
    await expect(seen.getByRole('heading', { name: 'The dome of the liver at the feet end' })).toBeVisible();
    const count = seen.locator('[data-figure="contaminated"]');
    const before = await count.innerText();
    await seen.getByLabel('Slice oversampling', { exact: true }).fill('12');
    await expect(count).not.toHaveText(before);
    expect(await seen.content()).not.toContain('partitions hold it');
    // Nothing else opens with it.
    expect((await stranger.request.get('/api/v1/bookings')).status()).toBe(401);
    expect((await stranger.request.get(`${address}/download`)).ok()).toBe(false);

    await page.reload();
    await expect(page.getByText('Opened 1 time.')).toBeVisible();
    await page.getByRole('button', { name: 'Revoke', exact: true }).click();
    await page.getByRole('button', { name: 'Revoke the link' }).click();
    await expect(page.getByText('is revoked')).toBeVisible();
    expect((await stranger.request.get(link)).status()).toBe(404);
    expect((await stranger.request.get(`/shown/${'A'.repeat(43)}`)).status()).toBe(404);
    await stranger.close();
  });
});
