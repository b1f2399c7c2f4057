import type { Page } from '@playwright/test';
import { expect, test } from '@/tests/support/e2e/journey';
import { countsSoFar, dragHandle, watchDrags, type DragCounts } from '@/tests/support/e2e/drag-handle';
import { countOf } from '@/tests/support/tally';
import { benchAnswers, sceneNodes, sceneText, verdict, type Stage } from '@/tests/support/e2e/bench-page';

/** Each handle is swung for this long; several moves fall into one frame, so that an assessment per move would be noticed. */
const DRAG_MS = 1_000 * countOf('SELVEDGE_DRAG_SECONDS', 5);
/** A section of the abdomen with its pieces, ghosts, edges, organs and handles paints about half as many. */
const MOST_NODES = 200;

type Panel = keyof DragCounts['changes'];
type Drag = readonly [id: string, dx: number, dy: number, untouched: readonly Panel[]];

interface Drags {
  /** What puts the handles in sight. */
  readonly begin?: (page: Page) => Promise<void>;
  readonly stage?: Stage;
  readonly drags: readonly Drag[];
}

/** A panel that shows nothing of what is dragged is not to change. */
const DRAGS: Readonly<Record<string, Drags>> = {
  'the window': {
    drags: [
      ['fov-phase-low', 0, -30, ['patient', 'keepClear']],
      ['fov-phase-high', 0, 30, ['patient', 'keepClear']],
      ['fov-readout-high', 30, 0, ['patient', 'keepClear']],
      ['fov-centre', 15, 20, ['patient', 'keepClear']],
      ['fov-rotation', 25, 25, ['patient', 'keepClear']],
    ],
  },
  'the body and the areas': {
    begin: (page) => page.getByRole('checkbox', { name: 'More must stay displayed' }).check(),
    drags: [
      ['keep-clear-anterior', 0, 25, ['patient', 'prescription']],
      ['keep-clear-left', 25, 0, ['patient', 'prescription']],
      ['must-stay-posterior', 0, 15, ['patient', 'prescription']],
      ['extent-anterior', 0, -15, ['prescription']],
      ['extent-right', -15, 0, ['prescription']],
    ],
  },
  'the opening': {
    begin: (page) => page.getByRole('radio', { name: 'Bore', exact: true }).check(),
    stage: 'bore',
    drags: [['lateral-offset', 25, 0, ['prescription', 'keepClear']]],
  },
};

for (const [what, { begin, stage = 'section', drags }] of Object.entries(DRAGS)) {
  test(`handles of ${what} drag with one assessment and one draw an animation frame, and can be taken back in one step`, async ({ signedIn }) => {
    test.setTimeout(90_000 + drags.length * DRAG_MS);
    const page = await signedIn('radiographer');
    await page.goto('/bench');
    await benchAnswers(page);
    await begin?.(page);
    await expect(page.locator('[aria-busy="true"]')).toHaveCount(0);
    await watchDrags(page, stage);
    for (const [id, dx, dy, untouched] of drags) {
      const handle = page.locator(`[data-handle="${id}"]`);
      const told = async () => (await handle.getAttribute('aria-valuetext')) ?? (await handle.getAttribute('aria-label'));
      const start = await told();
      const before = await countsSoFar(page);
      await dragHandle(page, id, [dx, dy], DRAG_MS);
      await expect.poll(async () => (await countsSoFar(page)).assessments, { message: id }).toBeGreaterThan(before.assessments);
      const after = await countsSoFar(page);
      const frames = after.frames - before.frames + 1;
      expect(after.assessments - before.assessments, id).toBeLessThanOrEqual(frames);
      expect(after.mostInAFrame, id).toBe(1);
      expect(after.draws - before.draws, id).toBeGreaterThan(0);
      expect(after.draws - before.draws, id).toBeLessThanOrEqual(frames);
      expect(after.mostNodes, id).toBeLessThanOrEqual(MOST_NODES);
      for (const panel of untouched) expect(after.changes[panel] - before.changes[panel], `${panel} while ${id} is dragged`).toBe(0);
      expect(await told(), id).not.toBe(start);
      await page.getByRole('button', { name: 'Undo' }).click();
      await expect.poll(told, { message: `${id} is one step` }).toBe(start);
      await expect(page.locator('[aria-busy="true"]')).toHaveCount(0);
    }
  });
}

test('the picture is zoomed by wheel, keys and buttons, moved, and brought back whole', async ({ signedIn }) => {
  const page = await signedIn('radiographer');
  await page.goto('/bench');
  await benchAnswers(page);
  const picture = page.getByRole('group', { name: /^Section, / });
  const centre = page.locator('[data-handle="fov-centre"]');
  const placed = async () => (await centre.boundingBox())!;
  const start = await placed();
  const whole = (percent: number) => page.getByRole('button', { name: `Whole picture, now ${percent} %` });
  const box = (await picture.boundingBox())!;

  await picture.focus();
  await page.keyboard.press('+');
  await expect(whole(125)).toBeVisible();
  await page.getByRole('button', { name: 'Zoom in' }).click();
  await expect(whole(156)).toBeVisible();
  const zoomed = await placed();
  await centre.focus();
  await page.keyboard.press('Control+ArrowRight');
  await expect.poll(async () => Math.round((await placed()).x - zoomed.x)).toBe(-40);
  await page.mouse.move(box.x + 30, box.y + 60);
  await page.mouse.down();
  await page.mouse.move(box.x + 60, box.y + 60);
  await page.mouse.up();
  await expect.poll(async () => Math.round((await placed()).x - zoomed.x)).toBe(-10);
  await page.keyboard.press('0');
  await expect(whole(100)).toBeVisible();
  expect(await placed()).toEqual(start);

  await page.mouse.move(box.x + box.width / 2, box.y + box.height / 2);
  // With Ctrl the wheel is the picture's even where the page itself scrolls.
  await page.keyboard.down('Control');
  await page.mouse.wheel(0, -200);
  await page.keyboard.up('Control');
  await expect(whole(165)).toBeVisible();
  await page.keyboard.press('-');
  await page.keyboard.press('-');
  await page.keyboard.press('-');
  await expect(whole(100)).toBeVisible();
});

test('two fingers enlarge the picture, and every view is zoomed and moved by the same keys and buttons', async ({ signedIn }) => {
  const page = await signedIn('radiographer');
  await page.goto('/bench');
  await benchAnswers(page);
  const whole = (percent: number) => page.getByRole('button', { name: `Whole picture, now ${percent} %` });
  const section = (await page.getByRole('group', { name: /^Section, / }).boundingBox())!;
  const fingers = (apart: number) =>
    [-apart, apart].map((dx, id) => ({ x: section.x + section.width / 2 + dx, y: section.y + 24, id }));
  const touch = await page.context().newCDPSession(page);
  await touch.send('Input.dispatchTouchEvent', { type: 'touchStart', touchPoints: fingers(60) });
  for (const apart of [80, 100, 120]) await touch.send('Input.dispatchTouchEvent', { type: 'touchMove', touchPoints: fingers(apart) });
  await touch.send('Input.dispatchTouchEvent', { type: 'touchEnd', touchPoints: [] });
  await expect(whole(200)).toBeVisible();
  for (const [view, picture] of [['Picture', 'Simulated picture'], ['Bore', /^Opening of /]] as const) {
    await page.getByRole('radio', { name: view, exact: true }).check();
    await expect(whole(100)).toBeVisible();
    const box = page.getByRole('group', { name: picture });
    await box.focus();
    await page.keyboard.press('+');
    await page.getByRole('button', { name: 'Zoom in' }).click();
    await expect(whole(156)).toBeVisible();
    const canvas = box.locator('canvas').first();
    const seen = () => (view === 'Picture' ? canvas.boundingBox().then((at) => at?.x) : page.locator('[data-handle="lateral-offset"]').boundingBox().then((at) => at?.x));
    const before = (await seen())!;
    await box.focus();
    await page.keyboard.press('ArrowRight');
    await expect.poll(async () => Math.round((await seen())! - before)).toBe(-40);
    await page.keyboard.press('0');
    await expect(whole(100)).toBeVisible();
  }
});

test('the window turns by its corner, by key and by the typed field', async ({ signedIn }) => {
  const page = await signedIn('radiographer');
  await page.goto('/bench');
  await benchAnswers(page);
  const corner = page.getByRole('slider', { name: 'Rotation of the window in its plane, degrees' });
  await corner.focus();
  await page.keyboard.press('Shift+ArrowRight');
  await page.keyboard.press('ArrowRight');
  const turned = Number(await corner.getAttribute('aria-valuenow'));
  expect(Math.abs(turned)).toBe(11);
  await page.getByRole('button', { name: 'Window', exact: true }).click();
  const field = page.getByRole('spinbutton', { name: 'Rotation' });
  await expect(field).toHaveValue(String(turned));
  await field.fill('0');
  await expect(corner).toHaveAttribute('aria-valuenow', '0');
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
  await expect(page.getByText('4000 is too large; allowed: 0 to 1000 mm.')).toBeVisible();
  await expect(extent).toHaveAttribute('aria-valuenow', String(start));

  await page.getByRole('checkbox', { name: 'More must stay displayed' }).check();
  const edge = page.getByRole('slider', { name: 'Must stay displayed, left edge' });
  const twin = page.getByRole('group', { name: 'Must stay displayed' }).getByRole('spinbutton', { name: 'Left' });
  const from = Number(await twin.inputValue());
  await edge.focus();
  await page.keyboard.press('Shift+ArrowRight');
  await expect(twin).toHaveValue(String(from + 10));
  await twin.fill(String(from));
  await expect(edge).toHaveAttribute('aria-valuenow', String(from));
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
  await page.getByRole('group', { name: 'Slab, along the slice direction' }).press('+');
  await expect(page.getByRole('button', { name: 'Whole picture, now 125 %' })).toBeVisible();
});
