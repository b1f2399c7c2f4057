import { expect, test } from '@/tests/support/e2e/journey';
import { openBench, sceneNodes, sceneText, tabTo } from '@/tests/support/e2e/bench-page';

test('section, picture and bore are three looks at one state, by keyboard', async ({ signedIn }) => {
  const page = await signedIn('radiographer');
  await openBench(page, 'HB-2107');
  const view = (name: string) => page.getByRole('radio', { name, exact: true });

  await view('Section').focus();
  await page.keyboard.press('ArrowLeft');
  await expect(view('Bore')).toBeChecked();
  await expect.poll(() => sceneNodes(page, 'bore')).toEqual(expect.arrayContaining(['bore/opening', 'table', 'clearance', 'section/trunk/trunk']));
  await expect(page.getByText(/^Planning estimate, tightest at the /)).toBeVisible();
  const before = await sceneText(page, 'clearance/label', 'bore');
  await page.getByRole('slider', { name: /^Patient’s mid-line/ }).focus();
  for (let k = 0; k < 4; k += 1) await page.keyboard.press('Shift+ArrowRight');
  await expect(page.getByRole('spinbutton', { name: 'Patient to the left' })).toHaveValue('40');
  await expect.poll(() => sceneText(page, 'clearance/label', 'bore')).not.toBe(before);

  await view('Bore').focus();
  await page.keyboard.press('ArrowLeft');
  await expect(view('Picture')).toBeChecked();
  await expect(page.locator('canvas[data-picture="now"]')).toBeVisible();
  await expect(page.getByRole('img', { name: /^A simulation: .* Now: / })).toBeVisible();
  await page.locator('[data-remedy]').first().getByRole('heading').getByRole('button').press('Enter');
  await expect(page.locator('canvas[data-picture="tried"]')).toBeVisible();
  const wipe = page.getByRole('slider', { name: 'Wipe between now and tried' });
  const cut = () => page.locator('canvas[data-picture="tried"]').evaluate((canvas) => getComputedStyle(canvas).clipPath);
  const half = await cut();
  await wipe.focus();
  for (let k = 0; k < 5; k += 1) await page.keyboard.press('ArrowRight');
  await expect(wipe).toHaveAttribute('aria-valuenow', '55');
  expect(await cut()).not.toBe(half);

  // By pointer the wipe is taken hold of on the picture itself.
  const picture = (await page.getByRole('group', { name: 'Simulated picture' }).boundingBox())!;
  const middle = picture.y + picture.height / 2;
  await page.mouse.move(picture.x + picture.width * 0.6, middle);
  await page.mouse.down();
  await page.mouse.move(picture.x + picture.width * 0.4, middle);
  await page.mouse.up();
  await expect.poll(async () => Number(await wipe.getAttribute('aria-valuenow'))).toBeLessThan(50);
});

test('one slider of certainty changes how far the body is taken, and the sentence', async ({ signedIn }) => {
  const page = await signedIn('radiographer');
  await openBench(page, 'HB-2107');
  expect(await sceneNodes(page, 'section')).toContain('tissue/trunk/band');
  await tabTo(page, /^fold in (about )?[<>]? ?\d+ % · sure at 95 %$/);
  await page.keyboard.press('Enter');
  const sentence = page.locator('[data-probability]');
  await expect(sentence).toContainText('sure at 95 %');
  const slider = page.getByRole('slider', { name: 'Sure at, slider' });
  await slider.focus();
  await page.keyboard.press('Home');
  await expect(sentence).toContainText('sure at 50 %');
  await expect.poll(() => sceneNodes(page, 'section')).not.toContain('tissue/trunk/band');
  await expect(page.getByText('Site policy is 95 %: a saved plan is judged at that.')).toBeVisible();
  await page.getByRole('spinbutton', { name: 'Sure at' }).fill('80');
  await expect(sentence).toContainText('sure at 80 %');
  const knob = (await slider.boundingBox())!;
  await page.mouse.move(knob.x + knob.width / 2, knob.y + knob.height / 2);
  await page.mouse.down();
  await page.mouse.move(knob.x + 400, knob.y);
  await page.mouse.up();
  await expect(sentence).toContainText('sure at 99.9 %');
  await page.getByRole('button', { name: 'Back to site policy' }).press('Enter');
  await expect(sentence).toContainText('sure at 95 %');
});

test('"show all" lays remedies out as time against SNR, linked with the list', async ({ signedIn }) => {
  const page = await signedIn('radiographer');
  await openBench(page, 'HB-2107');
  await expect(page.locator('[data-remedy]').getByText('Fold in the keep-clear area')).toHaveCount(0);
  await page.getByRole('button', { name: /^Show all: / }).press('Enter');
  const chart = page.getByRole('group', { name: 'Remedies, scan time against SNR' });
  const points = chart.locator('[data-point]');
  expect(await points.count()).toBe(await page.locator('[data-remedy]').count());

  await chart.locator('[tabindex="0"]').focus();
  const first = await page.evaluate(() => document.activeElement?.getAttribute('data-point'));
  await page.keyboard.press('ArrowRight');
  const second = await page.evaluate(() => document.activeElement?.getAttribute('data-point'));
  expect(second).not.toBe(first);
  await page.keyboard.press('Enter');
  await expect(page.locator(`[data-remedy="${second}"]`).getByRole('heading').getByRole('button')).toHaveAttribute('aria-pressed', 'true');
  await expect.poll(() => sceneNodes(page, 'section')).toContain('tried-edge/low');

  // By pointer: the point that lies on top of the others is tried, and a filter leaves only what keeps the voxel.
  const onTop = await points.last().getAttribute('data-point');
  await points.last().click();
  await expect(page.locator(`[data-remedy="${onTop}"]`).getByRole('heading').getByRole('button')).toHaveAttribute('aria-pressed', String(onTop !== second));
  await page.getByRole('checkbox', { name: 'Keep the voxel' }).check();
  const voxels = page.locator('[data-remedy] dl > div').filter({ hasText: 'voxel' });
  await expect(voxels.filter({ hasText: '→' })).toHaveCount(0);
  expect(await voxels.count()).toBeGreaterThan(0);
});
