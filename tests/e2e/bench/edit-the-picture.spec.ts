import { expect, test } from '@/tests/support/e2e/journey';
import { benchAnswers, sceneNodes, sceneText, verdict } from '@/tests/support/e2e/bench-page';

/** Pointer moves of one drag: several fall into one frame, so that an assessment per move would be noticed. */
const MOVES = 12;

const DRAGS = [
  ['fov-phase-low', 0, -30],
  ['fov-phase-high', 0, 30],
  ['fov-readout-high', 30, 0],
  ['fov-centre', 15, 20],
  ['keep-clear-anterior', 0, 25],
  ['extent-anterior', 0, -15],
  ['extent-right', -15, 0],
] as const;

test('every handle drags with one assessment an animation frame, and can be taken back in one step', async ({ signedIn }) => {
  const page = await signedIn('radiographer');
  await page.goto('/bench');
  await benchAnswers(page);
  await page.evaluate(() => {
    const counts = { frames: 0, assessments: 0, perFrame: [] as number[] };
    Object.assign(window, { counts });
    const tick = () => {
      counts.frames += 1;
      requestAnimationFrame(tick);
    };
    requestAnimationFrame(tick);
    new PerformanceObserver((list) => {
      counts.assessments += list.getEntriesByName('selvedge:assess').length;
    }).observe({ type: 'measure' });
  });
  const counts = () =>
    page.evaluate(() => ({ ...(window as unknown as { counts: { frames: number; assessments: number } }).counts }));

  for (const [id, dx, dy] of DRAGS) {
    const handle = page.locator(`[data-handle="${id}"]`);
    const box = (await handle.boundingBox())!;
    const [x, y] = [box.x + box.width / 2, box.y + box.height / 2];
    const before = await counts();
    await page.mouse.move(x, y);
    await page.mouse.down();
    for (let step = 1; step <= MOVES; step += 1) await page.mouse.move(x + (dx * step) / MOVES, y + (dy * step) / MOVES);
    await page.mouse.up();
    await expect.poll(async () => (await counts()).assessments, { message: id }).toBeGreaterThan(before.assessments);
    const after = await counts();
    expect(after.assessments - before.assessments, id).toBeLessThanOrEqual(after.frames - before.frames + 1);
    const undo = page.getByRole('button', { name: 'Undo' });
    await undo.click();
    await expect(undo, `${id} is one step`).toBeDisabled();
  }
});

test('every handle has a typed twin and arrow-key steps', async ({ signedIn }) => {
  const page = await signedIn('radiographer');
  await page.goto('/bench');
  await benchAnswers(page);
  const extent = page.getByRole('slider', { name: 'Body extent, anterior' });
  const field = page.getByRole('form', { name: 'Patient' }).getByRole('spinbutton', { name: 'Anterior' });
  const start = Number(await field.inputValue());
  await extent.focus();
  await page.keyboard.press('ArrowUp');
  await expect(field).toHaveValue(String(start + 1));
  await page.keyboard.press('Shift+ArrowUp');
  await expect(field).toHaveValue(String(start + 11));
  await expect(extent).toHaveAttribute('aria-valuetext', `body anterior ${start + 11} mm`);
  await field.fill(String(start));
  await expect(extent).toHaveAttribute('aria-valuenow', String(start));

  await field.fill('4000');
  await expect(page.getByText('4000 is too large. Allowed: 0 to 1000 mm.')).toBeVisible();
  await expect(extent).toHaveAttribute('aria-valuenow', String(start));
});

test('a landed piece is tied to where it comes from, and says so', async ({ signedIn }) => {
  const page = await signedIn('radiographer');
  await page.goto('/bench');
  await page.getByLabel('Scanner').selectOption('Scanner B');
  await expect(page).toHaveURL(/scanner=/);
  await benchAnswers(page);
  await expect(verdict(page)).toHaveText('Fold in the keep-clear area');
  await expect.poll(async () => (await sceneNodes(page, 'section')).some((name) => name.startsWith('piece/'))).toBe(true);
  const nodes = await sceneNodes(page, 'section');
  for (const part of ['source', 'landed', 'landed/hatch', 'in-keep-clear', 'in-keep-clear/hatch']) {
    expect(nodes.some((name) => name.startsWith('piece/') && name.endsWith(`/${part}`)), part).toBe(true);
  }
  expect(nodes).toEqual(expect.arrayContaining(['letter/left', 'letter/right', 'letter/top', 'letter/bottom', 'scale-bar', 'phase-direction', 'keep-clear', 'acquired-edge/low/ticks']));
  const piece = page.locator('[data-piece]').first();
  await piece.focus();
  await expect.poll(() => sceneText(page, 'thread/label')).toMatch(/^from the \w+ side, (\d+ mm away|place uncertain)$/);
  await expect(piece).toHaveAccessibleName(/tissue from the \w+ side lands/);
  await expect(page.getByRole('group', { name: /^Section, / })).toHaveAccessibleDescription(/Displayed: \d+ mm/);
});

test('an accelerated scan whose unfolding ends at the acquired width shows ghosts, tied to their source', async ({ signedIn }) => {
  const page = await signedIn('radiographer');
  await page.goto('/bench');
  await page.getByLabel('Scanner').selectOption('Scanner A');
  await benchAnswers(page);
  await expect.poll(async () => (await sceneNodes(page, 'section')).filter((name) => /^ghost\/.*\/in-keep-clear$/.test(name)).length).toBeGreaterThan(0);
  await expect.poll(() => sceneText(page, 'thread/label')).toMatch(/^ghost of tissue from the \w+ side/);
});

test('a 3D sequence shows its slab, with the partitions that hold tissue from the other end', async ({ signedIn }) => {
  const page = await signedIn('radiographer');
  await page.goto('/bench');
  await benchAnswers(page);
  await page.getByRole('button', { name: /T1 3D gradient echo/ }).click();
  await page.getByText('Slab', { exact: true }).first().click();
  await expect.poll(() => sceneNodes(page, 'slab')).toEqual(expect.arrayContaining(['profile', 'keep-clear', 'partition/0', 'acquired-edge/high']));
  await expect(page.getByText(/Slice oversampling, S–I/)).toBeVisible();
});
