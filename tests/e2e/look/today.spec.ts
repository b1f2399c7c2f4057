import { expect, test } from '@/tests/support/e2e/journey';

test('today shows each booking with its state, and the next one opens in one press', async ({ signedIn }) => {
  const page = await signedIn('radiographer');
  await page.goto('/today');
  const list = page.getByRole('main').getByRole('list').first();
  await expect(list.getByRole('listitem').first()).toContainText(/HB-\d{4}/);
  await expect(list).toContainText('Fold in the keep-clear area');
  await page
    .getByRole('main')
    .getByRole('link', { name: /bench|plan/i })
    .first()
    .click();
  await expect(page).toHaveURL(/\/(bench|plans)\//);
});

test('bookings are sorted and searched in the address', async ({ signedIn }) => {
  const page = await signedIn('coordinator');
  await page.goto('/bookings');
  // The demo's own: other journeys add bookings meanwhile.
  const accessions = () => page.getByRole('link', { name: /^HB-21\d\d$/ }).allInnerTexts();
  const all = await accessions();
  expect(all.length).toBeGreaterThan(5);
  await page.getByRole('link', { name: 'When' }).click();
  await expect(page).toHaveURL(/sort=-time/);
  await expect.poll(accessions).toEqual([...all].reverse());
  const wanted = all[2]!;
  await page.getByLabel('Accession contains').fill(wanted);
  await page.getByRole('button', { name: 'Show', exact: true }).click();
  await expect(page).toHaveURL(new RegExp(`find=${wanted}`));
  await expect.poll(accessions).toEqual([wanted]);
  await page.reload();
  await expect.poll(accessions).toEqual([wanted]);
});

test('an accession that looks like a name is refused and stays as typed', async ({ signedIn }) => {
  const page = await signedIn('coordinator');
  await page.goto('/bookings/new');
  await page.getByLabel('Accession number').fill('Smith Jane');
  await page.getByLabel('Start of the slot').fill('10:40');
  await page.getByLabel('Scanner').selectOption({ index: 1 });
  await page.getByLabel('Protocol').selectOption({ index: 1 });
  await page.getByRole('button', { name: 'Add this booking' }).click();
  await expect(page.getByText('This looks like a name.')).toBeVisible();
  await expect(page.getByLabel('Accession number')).toHaveValue('Smith Jane');
  await expect(page.getByLabel('Start of the slot')).toHaveValue('10:40');
});

test('an educator has no bookings to see', async ({ signedIn, expectedErrors }) => {
  expectedErrors.push(/404/);
  const page = await signedIn('educator');
  await page.goto('/today');
  await expect(page.getByRole('heading', { name: 'There is nothing at this address' })).toBeVisible();
  await expect(page.getByRole('navigation', { name: 'Main' }).getByRole('link')).toHaveText([
    'Bench',
    'Demonstrations',
    'Site',
  ]);
});
