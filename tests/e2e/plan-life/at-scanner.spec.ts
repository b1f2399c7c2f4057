import { expect, test } from '@/tests/support/e2e/journey';
import { newBooking } from '@/tests/support/e2e/new-booking';

test.use({ viewport: { width: 820, height: 1180 }, hasTouch: true });

test('sizes off the localiser, verdict and adopt go on without a network, and are saved when it is back', async ({ signedIn, expectedErrors }) => {
  // What the browser itself says of a network that is switched off.
  expectedErrors.push(/ERR_INTERNET_DISCONNECTED/, /Failed to fetch/);
  const page = await signedIn('radiographer');
  const context = page.context();
  const booking = await newBooking(context, 9141);
  await page.goto(`/bench/${booking.id}/at-scanner`);
  const folding = page.getByRole('region', { name: 'Sequences' }).getByText('Fold in the keep-clear area');
  await expect(folding.first()).toBeVisible();

  // The engine's Worker answers once; from then on the network is not needed.
  await page.getByRole('button', { name: 'Front, 5 mm more' }).tap();
  await expect(page.getByRole('button', { name: 'Adopt' })).toBeVisible();
  await context.setOffline(true);
  await page.getByRole('button', { name: 'Back, 5 mm more' }).tap();
  await expect(page.getByRole('spinbutton', { name: 'Back' })).toHaveValue('175');
  const before = await folding.count();
  await page.getByRole('button', { name: 'Adopt' }).tap();
  await expect(folding).toHaveCount(before - 1);

  await page.getByRole('button', { name: 'Save sizes and plan' }).tap();
  await expect(page.getByText(/^No network\. 2 changes wait in this tab/)).toBeVisible();
  await context.setOffline(false);
  await expect(page.getByText('Saved: draft, version 1')).toBeVisible({ timeout: 30_000 });

  await page.goto(`/bookings/${booking.id}`);
  const readings = page.getByRole('table', { name: 'Readings' });
  await expect(readings.getByRole('row', { name: /Extent, anterior 175 ± 3 mm read off the localiser/ })).toHaveCount(1);
  await expect(readings.getByRole('row', { name: /Extent, posterior 175 ± 3 mm read off the localiser/ })).toHaveCount(1);
});

test('what waits outlives a reload of the tab', async ({ signedIn, expectedErrors }) => {
  expectedErrors.push(/503/);
  const page = await signedIn('radiographer');
  const booking = await newBooking(page.context(), 9142);
  await page.goto(`/bench/${booking.id}/at-scanner`);
  await page.route('**/api/v1/bookings/*/size-readings', (route) => route.fulfill({ status: 503, body: '{}' }));
  await page.getByRole('spinbutton', { name: 'Left' }).fill('251');
  await page.getByRole('button', { name: 'Save sizes and plan' }).press('Enter');
  await expect(page.getByText(/^No network\. 2 changes wait/)).toBeVisible();
  await page.unroute('**/api/v1/bookings/*/size-readings');
  await page.reload();
  await expect(page.getByText('Saved: draft, version 1')).toBeVisible({ timeout: 30_000 });
  await expect(page.getByRole('spinbutton', { name: 'Left' })).toHaveValue('251');
});
