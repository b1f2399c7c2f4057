import { randomUUID } from 'node:crypto';
import { expect, test } from '@/tests/support/e2e/journey';
import { linkIn, mailTo } from '@/tests/support/e2e/mail';

test('a size request is answered from its mail on a phone and flips the booking', async ({ signedIn, browser }) => {
  const address = `patient-${randomUUID().slice(0, 8)}@mail.example`;
  const accession = `HB-${String(Math.floor(Math.random() * 900) + 6000)}`;
  const page = await signedIn('coordinator');
  await page.goto('/bookings/new');
  await page.getByLabel('Accession number').fill(accession);
  await page.getByLabel('Start of the slot').fill('10:40');
  await page.getByLabel('Scanner', { exact: true }).selectOption({ label: 'Scanner B' });
  await page.getByLabel('Protocol', { exact: true }).selectOption({ label: 'Pelvis' });
  await page.getByRole('button', { name: /^Add/ }).click();
  await expect(page).toHaveURL(/\/bookings\/[0-9a-f-]{36}/);
  const panel = page.locator('section').filter({ has: page.getByRole('heading', { name: 'Pre-check' }) });
  const shown = async () => {
    await page.reload();
    return panel.textContent();
  };
  await expect.poll(shown, { message: 'the first check', timeout: 60_000 }).toMatch(/Size needed/);
  await page.getByLabel('E-mail address').fill(address);
  await page.getByRole('button', { name: 'Send by e-mail' }).click();
  await expect(page.getByText('Not answered yet')).toBeVisible();
  await expect(page.getByText(address)).toHaveCount(0);

  const mail = await mailTo(address);
  const link = linkIn(mail);
  const secret = new URL(link).hash.slice(1);
  const phone = await (await browser.newContext({ viewport: { width: 390, height: 844 }, locale: 'en-GB' })).newPage();
  const addresses: string[] = [];
  phone.on('request', (request) => addresses.push(`${request.url()} ${request.headers()['referer'] ?? ''}`));
  const answer = await phone.goto(link);
  expect(answer!.headers()).toMatchObject({ 'referrer-policy': 'no-referrer', 'x-robots-tag': 'noindex, nofollow', 'cache-control': expect.stringContaining('no-store') });
  await expect(phone.getByRole('heading', { name: 'A few measurements for your scan' })).toBeVisible();
  await expect(phone.getByText(accession)).toHaveCount(0);
  expect(new URL(phone.url()).hash).toBe('');
  // Opening uses nothing up: the page reloads on its cookie, and the link opens again.
  await phone.reload();
  await expect(phone.getByRole('heading', { name: 'A few measurements for your scan' })).toBeVisible();

  await phone.getByLabel('Weight').fill('60');
  await phone.getByLabel('Height', { exact: true }).fill('168');
  await phone.getByLabel('All the way round').fill('800');
  await phone.getByLabel('Men’s', { exact: true }).check();
  await phone.getByRole('radio', { name: 'No', exact: true }).check();
  await phone.getByLabel(/How long can you hold your breath/).fill('25');
  const send = phone.getByRole('button', { name: 'Send the measurements' });
  await send.click();
  await expect(phone.getByText(/800 looks like millimetres: did you mean 80 cm/)).toBeVisible();
  await phone.getByLabel('All the way round').fill('80');
  await send.click();
  await expect(phone.getByRole('heading', { name: 'Thank you' })).toBeVisible();
  expect(addresses.filter((text) => text.includes(secret))).toEqual([]);
  await phone.goto('about:blank');
  await phone.goto(link);
  await expect(phone.getByText(/has been answered/)).toBeVisible();
  expect(await phone.evaluate(() => document.documentElement.scrollWidth <= window.innerWidth)).toBe(true);

  await page.reload();
  await expect(page.getByText('Answered', { exact: true })).toBeVisible();
  await expect(page.getByRole('region', { name: 'Readings' })).toContainText('80');
  // A slim person whose arms stay down in the wide opening: the engine finds nothing, so the booking stands as it is.
  await expect.poll(shown, { message: 'the check of the answer', timeout: 60_000 }).toMatch(/As booked/);
  await expect(panel).toContainText('Nothing found that speaks against it.');
});
