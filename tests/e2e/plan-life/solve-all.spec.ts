import { benchAnswers, tabTo } from '@/tests/support/e2e/bench-page';
import { expect, test } from '@/tests/support/e2e/journey';
import { anotherPerson, newBooking } from '@/tests/support/e2e/new-booking';

test('solve all proposes a remedy for each sequence that folds, says the minutes, adopts all, and one undo takes it back', async ({ signedIn }) => {
  const page = await signedIn('radiographer');
  const booking = await newBooking(page.context(), 9121);
  await page.goto(`/bench/${booking.id}`);
  await benchAnswers(page);
  const folding = page.getByRole('list', { name: 'Sequences' }).getByText('Fold in the keep-clear area');
  const before = await folding.count();
  expect(before).toBeGreaterThan(0);

  await page.getByRole('button', { name: 'Solve all' }).click();
  const proposal = page.getByRole('region', { name: 'The cheapest remedy for each' });
  await expect(proposal).toBeVisible();
  await expect(proposal.locator('[data-solved]')).toHaveCount(before);
  await expect(proposal.locator('[data-total-change]')).toContainText(/All sequences together: \d+:\d\d/);
  // Nothing is adopted until it is said so.
  await expect(folding).toHaveCount(before);

  await proposal.getByRole('button', { name: /^Adopt (all \d+|it)$/ }).click();
  await expect(folding).toHaveCount(0);
  await page.keyboard.press('Control+z');
  await expect(folding).toHaveCount(before);

  // The same by keyboard alone: left, asked for again, adopted.
  await tabTo(page, /^Solve all/);
  await page.keyboard.press('Enter');
  await expect(proposal).toBeVisible();
  await page.keyboard.press('Escape');
  await expect(proposal).toHaveCount(0);
  await page.getByRole('button', { name: 'Solve all' }).press('Enter');
  await expect(proposal).toBeVisible();
  await tabTo(page, /^Adopt (all \d+|it)$/, 2);
  await page.keyboard.press('Enter');
  await expect(folding).toHaveCount(0);
});

test('an area asked for by a radiologist is on the bench under their name', async ({ signedIn, browser }) => {
  const page = await signedIn('radiographer');
  const booking = await newBooking(page.context(), 9122);
  const radiologist = await anotherPerson(browser, 'radiologist');
  await radiologist.goto(`/bookings/${booking.id}`);
  await radiologist.getByText('Ask for an area').click();
  await radiologist.getByLabel('Starts from').selectOption('kidneys');
  await radiologist.getByLabel('Tolerated fold beside the area').fill('10');
  await radiologist.getByLabel('What the exam is about').fill('Left renal mass.');
  await radiologist.getByRole('button', { name: 'Ask for this keep-clear area' }).click();
  await expect(radiologist.getByText('tolerated up to')).toBeVisible();
  await radiologist.context().close();

  await page.goto(`/bench/${booking.id}`);
  await benchAnswers(page);
  await expect(page.getByText(/Asked for by .*Left renal mass\./)).toBeVisible();
  const area = page.getByLabel('What must stay free of fold');
  await expect(area.locator('option:checked')).toHaveText('Kidneys, asked for');
  await area.selectOption('liver');
  await expect(page.getByText('The plan holds another area.')).toBeVisible();
  await area.selectOption('whole-picture');
  await expect(page.getByText('All that is displayed must stay free of fold.')).toBeVisible();
});
