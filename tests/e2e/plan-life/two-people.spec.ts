import { benchAnswers } from '@/tests/support/e2e/bench-page';
import { expect, test } from '@/tests/support/e2e/journey';
import { anotherPerson, newBooking } from '@/tests/support/e2e/new-booking';

test('two people begin one plan at once: the second is told, shown the difference, and loses nothing', async ({ signedIn, browser, expectedErrors }) => {
  const one = await signedIn('radiographer');
  const booking = await newBooking(one.context(), 9111);
  const two = await anotherPerson(browser, 'lead');
  for (const page of [one, two]) {
    await page.goto(`/bench/${booking.id}`);
    await benchAnswers(page);
  }
  const right = (page: typeof one) => page.getByRole('spinbutton', { name: 'Right', exact: true }).first();
  await right(one).fill('250');
  await right(one).press('Tab');
  await one.getByRole('button', { name: 'Save plan' }).click();
  await expect(one.getByText('Saved: draft, version 1')).toBeVisible();

  // While both work: whoever comes back to the page is told, and goes on working.
  await right(two).fill('262');
  await right(two).press('Tab');
  await two.evaluate(() => window.dispatchEvent(new Event('visibilitychange')));
  await expect(two.getByText(/saved version 1 of this plan at \d\d:\d\d, while you were working on one that is not saved yet/)).toBeVisible();
  await expect(right(two)).toHaveValue('262');
  await two.getByRole('button', { name: 'Save plan' }).click();
  await expect(two.getByText(/saved version 1 while you were working/)).toBeVisible();
  const differing = two.getByRole('table', { name: 'Values that differ' });
  await expect(differing.getByRole('row').filter({ hasText: '250' }).filter({ hasText: '262' })).toBeVisible();
  await expect(right(two)).toHaveValue('262');

  await two.getByRole('button', { name: 'Save yours as version 2' }).click();
  await expect(two.getByText('Saved: draft, version 2')).toBeVisible();
  await two.context().close();

  // The first one's plan, not another in front of it: both versions are there.
  await one.goto(`/bookings/${booking.id}`);
  await one.getByRole('link', { name: 'Open the plan' }).click();
  await one.getByRole('link', { name: 'Two versions side by side' }).click();
  await expect(one.getByRole('row', { name: /^Right, size 250 mm 262 mm/ })).toBeVisible();
  expectedErrors.push(/409/);
});
