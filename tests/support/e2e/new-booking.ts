import { expect, type Browser, type BrowserContext, type Page } from '@playwright/test';
import { accountOf, type DemoRole, signIn } from './journey';

const address = () => String(process.env.SELVEDGE_E2E_URL);

/** A page of a second person, in a browser of their own; the caller closes its context. */
export async function anotherPerson(browser: Browser, role: DemoRole): Promise<Page> {
  const context = await browser.newContext({ baseURL: address() });
  await signIn(context.request, await accountOf(role));
  return context.newPage();
}

async function call<T>(context: BrowserContext, method: 'get' | 'post', path: string, data?: unknown): Promise<T> {
  const answer = await context.request[method](`${address()}/api/v1${path}`, {
    headers: { origin: address(), 'content-type': 'application/json' },
    ...(data === undefined ? {} : { data }),
  });
  expect(answer.ok(), `${method} ${path}: ${await answer.text()}`).toBe(true);
  return (await answer.json()) as T;
}

export interface NewBooking {
  readonly id: string;
  readonly accession: string;
}

/** A booking that no other journey touches: an abdomen of large habitus whose sequences fold on the liver. */
export async function newBooking(context: BrowserContext, number: number): Promise<NewBooking> {
  const accession = `HB-${number}`;
  const { scanners } = await call<{ scanners: { id: string; scanner: { boreDiameterMm: number } }[] }>(context, 'get', '/scanners');
  const { protocols } = await call<{ protocols: { id: string; region: string }[] }>(context, 'get', '/protocols');
  const { id } = await call<{ id: string }>(context, 'post', '/bookings', {
    accession,
    scheduledAt: new Date(Date.now() + 86_400_000).toISOString(),
    slotMinutes: 45,
    scannerId: scanners.find(({ scanner }) => scanner.boreDiameterMm >= 700)!.id,
    protocolId: protocols.find(({ region }) => region === 'abdomen')!.id,
  });
  const takenOn = new Date().toISOString().slice(0, 10);
  const reading = (quantity: string, value: number) => ({ quantity, value, source: 'measured', spread: 3, takenOn });
  await call(context, 'post', `/bookings/${id}/size-readings`, {
    readings: [reading('breadth-mm', 480), reading('depth-mm', 340), reading('arms-position', 1), reading('weight-kg', 132)],
  });
  return { id, accession };
}
