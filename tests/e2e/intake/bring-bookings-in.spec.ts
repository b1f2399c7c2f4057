import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import type { APIRequestContext, Page } from '@playwright/test';
import { BUNDLE_BOOKINGS } from '@/fixtures/files/bookings/demo-bundle-bookings';
import { DEMO_COLUMNS, DEMO_ROWS } from '@/fixtures/files/bookings/demo-rows';
import { CsvReader, writeRow } from '@/lib/csv';
import type { ProtocolView } from '@/lib/schemas/protocol';
import type { ScannerView } from '@/lib/schemas/scanner';
import type { PolicyView } from '@/lib/schemas/site-policy';
import { expect, test } from '@/tests/support/e2e/journey';
import { bundleBookings, csvBookings, expectedCheck, movedOn, YEARS_ON, type ExpectationSetup } from '@/tests/support/intake-expectations';
import { countOf } from '@/tests/support/tally';

const fixture = (name: string) => readFileSync(fileURLToPath(new URL(`../../../fixtures/files/bookings/${name}`, import.meta.url)), 'utf8');
/** The demo file as if it were written for a year to come, so that no session of the demo site is in its days. */
const file = (name: string, mimeType: string) => ({ name, mimeType, buffer: Buffer.from(movedOn(fixture(name), YEARS_ON)) });
const CSV = file('demo-bookings.csv', 'text/csv');
const BUNDLE = file('demo-bundle.json', 'application/json');
/** Of the bookings brought in, soonest first, so many are waited for; the worker takes them in that order. */
const COMPARED = countOf('SELVEDGE_INTAKE_CHECKED', 24);

/** Everything in the files that is none of ours: names, birth dates, remarks, other numbers of the person. */
function plantedTexts(): string[] {
  const csv = fixture('demo-bookings.csv');
  const names = DEMO_ROWS.flatMap(([name]) => name!.split(', '));
  const births = DEMO_ROWS.map((row) => row[1]!);
  const bundle = fixture('demo-bundle.json');
  const found = [...names, ...births, 'do not tell her sister', 'claustrophobic', 'interpreter', 'second line', '12.04.1961', 'P-77', '1950-04-12', 'kilos', 'Patient/', 'urn:uuid'];
  for (const text of ['P-77', '1950-04-12', 'kilos', 'Patient/', 'urn:uuid', 'Okonkwo-Hale']) expect(bundle).toContain(text);
  expect(csv).toContain('Okonkwo-Hale');
  return [...new Set(found)];
}

/** Every request the browser makes from now on, of the page and of its workers: address, headers and body. */
function recordRequests(page: Page): string[] {
  const sent: string[] = [];
  page.context().on('request', (request) => sent.push([request.url(), JSON.stringify(request.headers()), request.postDataBuffer()?.toString('utf8') ?? ''].join('\n')));
  return sent;
}

const count = async (page: Page, words: RegExp) => page.getByRole('status').filter({ hasText: words }).textContent();
const choose = (page: Page, chosen: typeof CSV) => page.getByLabel('Choose a CSV file or a FHIR bundle').setInputFiles(chosen);
const compare = (page: Page) => page.getByRole('button', { name: 'Compare with the bookings' }).click();

/** The site as the API tells it, for the engine. */
async function readSetup(request: APIRequestContext, zone: string): Promise<ExpectationSetup> {
  const get = async <T>(path: string) => (await (await request.get(`/api/v1${path}`)).json()) as T;
  const { scanners } = await get<{ scanners: ScannerView[] }>('/scanners');
  const { protocols } = await get<{ protocols: { id: string; name: string }[] }>('/protocols');
  const { policy, pathway } = await get<PolicyView>('/policy');
  const scanner = (name: string) => {
    const { id, version, scanner: model, limitsOwner, limitsCheckedOn, note } = scanners.find((one) => one.scanner.name === name)!;
    return { id, version, archivedAt: null, document: { schemaVersion: 1 as const, scanner: model, limitsOwner, limitsCheckedOn, note } };
  };
  const protocol = async (starts: string) => {
    const { id, version, name, region, keepClearPreset, keepClear, sequences } = await get<ProtocolView>(`/protocols/${protocols.find((one) => one.name.startsWith(starts))!.id}`);
    return { id, version, document: { schemaVersion: 1 as const, name, region, keepClearPreset, keepClear }, sequences: sequences.map((one, position) => ({ ...one, position })) };
  };
  return { zone, policy, pathway, scanners: { A: scanner('Scanner A'), B: scanner('Scanner B') }, protocols: { abdomen: await protocol('Abdomen'), pelvis: await protocol('Pelvis') } };
}

type Shown = Readonly<Record<'Accession' | 'Pre-check' | 'Minutes over' | 'Next' | 'Stale', string>>;

/** The table's own rows, as it hands them out. */
async function shownRows(request: APIRequestContext): Promise<Map<string, Shown>> {
  const answer = await request.get(`/bookings/export?from=${2027 + YEARS_ON}-01-01&to=${2027 + YEARS_ON}-01-31`);
  const reader = new CsvReader(',');
  const [titles, ...rows] = [...reader.push((await answer.text()).replace('\ufeff', '')), ...reader.end()].map(({ fields }) => fields);
  return new Map(rows.map((fields) => [fields[0]!, Object.fromEntries(titles!.map((title, index) => [title, fields[index]])) as unknown as Shown]));
}

test('300 rows and a bundle are brought in, come to what the engine says of them, and a proposed move is confirmed by the next file', async ({ signedIn }) => {
  test.setTimeout(240_000);
  const page = await signedIn('coordinator');
  await page.goto('/bookings/import');
  const sent = recordRequests(page);
  await choose(page, CSV);

  await expect(page.getByLabel('Accession number', { exact: true })).toHaveValue('Accession number');
  await expect(page.getByLabel('Weight', { exact: true })).toHaveValue('Weight (lb)');
  await expect(page.getByLabel('Unit of Weight')).toHaveValue('lb');
  await expect(page.getByLabel('Unit of Girth at the iliac crest')).toHaveValue('in');
  await page.getByLabel('Slot, minutes').selectOption('Minutes');
  await page.getByLabel('Scanner', { exact: true }).selectOption('Room');
  await page.getByLabel('Protocol', { exact: true }).selectOption('Exam');
  for (const [name, nth] of [[/^room\s+1$/i, 1], [/^room\s+2$/i, 2], [/^Abdo$/, 1], [/^Pelvis$/, 2]] as const) {
    await page.getByLabel(name).selectOption({ index: nth });
  }
  await page.getByRole('radio', { name: 'Measured by staff' }).click();
  const zone = /clocks show them in (\S+)\./.exec((await page.getByText(/clocks show them in/).textContent()) ?? '')![1]!;
  await compare(page);
  const told = await count(page, /left out/);
  // Of the traps in the file (see its rows) twelve cannot be booked.
  expect(told).toMatch(/288 new, 0 changed, 0 the same as booked, 12 left out/);
  await page.getByText('Left out 12').click();
  const table = page.getByRole('region', { name: 'What the file will do, row by row' });
  await expect(table.getByRole('row')).toHaveCount(13);
  const shown = (await table.textContent()) ?? '';
  const planted = plantedTexts();
  for (const text of planted) expect(shown).not.toContain(text);
  await page.getByRole('button', { name: 'Book 288 rows' }).click();
  await expect(page.getByText('288 booked, 0 changed', { exact: true })).toBeVisible();

  // The same file again changes nothing, and how it is read was kept.
  await page.goto('/bookings/import');
  await choose(page, CSV);
  await expect(page.getByLabel('Scanner', { exact: true })).toHaveValue('Room');
  await compare(page);
  await expect(page.getByText(/^0 new, 0 changed, 288 the same as booked, 12 left out$/)).toBeVisible();
  await expect(page.getByRole('button', { name: 'Book 0 rows' })).toBeDisabled();

  await page.goto('/bookings/import');
  await choose(page, BUNDLE);
  await page.getByLabel('Liver', { exact: true }).selectOption({ index: 1 });
  await compare(page);
  // Eight appointments and four observations of it are traps.
  await expect(page.getByText(/^40 new, 0 changed, 0 the same as booked, 12 left out$/)).toBeVisible();
  await page.getByRole('button', { name: 'Book 40 rows' }).click();
  await expect(page.getByText('40 booked, 0 changed', { exact: true })).toBeVisible();

  const { request } = page.context();
  const setup = await readSetup(request, zone);
  const soonest = [...csvBookings(zone), ...bundleBookings()].sort((a, b) => a.scheduledAt.getTime() - b.scheduledAt.getTime()).slice(0, COMPARED);
  const expected = soonest.map((booking) => {
    const { result, minutesOver, next, alternatives } = expectedCheck(booking, setup);
    return { booking, alternatives, row: { Accession: booking.accession, 'Pre-check': result, 'Minutes over': String(minutesOver), Next: next.text } };
  });
  expect(new Set(expected.map(({ row }) => row['Pre-check'])).size, 'kinds of result compared').toBeGreaterThanOrEqual(3);
  const checked = async () => {
    const rows = await shownRows(request);
    expect(rows.size).toBe(DEMO_ROWS.length - 12 + BUNDLE_BOOKINGS.length);
    return expected.filter(({ row }) => rows.get(row.Accession)?.Stale !== 'no').length;
  };
  await expect.poll(checked, { message: 'checks still to come', timeout: 180_000 }).toBe(0);
  const rows = await shownRows(request);
  for (const { row } of expected) expect(rows.get(row.Accession)).toMatchObject(row);

  // One that needs another scanner is proposed on the one that is not ruled out, and the next file says so.
  const { booking } = expected.find(({ booking: { accession }, alternatives }) => accession < 'HB-4500' && alternatives.some(({ standing }) => standing !== 'ruled-out'))!;
  const other = booking.scanner === 'A' ? 'Scanner B' : 'Scanner A';
  await page.goto(`/bookings?from=${2027 + YEARS_ON}-01-01&to=${2027 + YEARS_ON}-01-31&find=${booking.accession}`);
  await page.getByRole('link', { name: booking.accession, exact: true }).click();
  const day = new Date(Date.now() + 6 * 86_400_000).toISOString().slice(0, 10);
  const form = page.getByRole('form', { name: 'Propose a move' });
  await form.getByLabel('Scanner', { exact: true }).selectOption(other);
  await form.getByLabel('Day').fill(day);
  await form.getByLabel('Start of the slot').fill('09:05');
  const minutes = await form.getByRole('spinbutton').inputValue();
  await form.getByRole('button', { name: 'Propose this move' }).click();
  await expect(page.getByText('Change it in your booking system')).toBeVisible();

  const moved = [...DEMO_ROWS.find((row) => row[2] === booking.accession)!];
  const set = (column: (typeof DEMO_COLUMNS)[number], value: string) => { moved[DEMO_COLUMNS.indexOf(column)] = value; };
  set('Room', other === 'Scanner A' ? 'Room 1' : 'Room 2');
  const text = (row: readonly string[]) => movedOn(writeRow(row, ';'), YEARS_ON);
  set('Exam date', 'DAY');
  set('Time', '09:05');
  set('Minutes', minutes);
  const next = `${text(DEMO_COLUMNS)}\r\n${text(moved).replace('DAY', day.split('-').reverse().join('.'))}\r\n`;
  await page.goto('/bookings/import');
  await choose(page, { ...CSV, name: 'next.csv', buffer: Buffer.from(next) });
  await compare(page);
  await expect(page.getByText(/^0 new, 1 changed, 0 the same as booked, 0 left out$/)).toBeVisible();
  await page.getByRole('button', { name: 'Book 1 row' }).click();
  await expect(page.getByText('0 booked, 1 changed', { exact: true })).toBeVisible();
  await page.goto('/bookings/moves');
  await expect(page.getByRole('table', { name: 'Moves settled last' }).getByRole('row').filter({ hasText: booking.accession })).toContainText('followed');

  // The record really holds what was sent: the matched cells are in it, and nothing else of the files.
  const all = sent.join('\n');
  expect(all).toContain('HB-4000');
  expect(all).toContain('HB-4500');
  expect(all).toMatch(/"quantity":"weight-kg"/);
  for (const words of planted) expect(all, words).not.toContain(words);
});
