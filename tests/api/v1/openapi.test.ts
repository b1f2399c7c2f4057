import { randomUUID } from 'node:crypto';
import { readdirSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { beforeAll, describe, expect, it } from 'vitest';
import { GET as getDocument } from '@/app/api/v1/openapi.json/route';
import { DEMO_SITE_ID, demoId, seedDemo } from '@/db/seed';
import { SCOPES, type UserActor } from '@/lib/domain/access';
import { ANSWERS } from '@/lib/schemas/openapi/components';
import { OPERATIONS, type Operation } from '@/lib/schemas/openapi/operations';
import { createApiToken } from '@/lib/services/api-token/create-api-token';
import { ownerDatabase } from '@/tests/support/database';

const API = fileURLToPath(new URL('../../../app/api/v1/', import.meta.url));
type Handler = (request: Request, segment: { params: Promise<Record<string, string>> }) => Promise<Response>;

function routeFiles(folder = ''): string[] {
  return readdirSync(API + folder, { withFileTypes: true }).flatMap((entry) =>
    entry.isDirectory() ? routeFiles(`${folder}${entry.name}/`) : entry.name === 'route.ts' ? [folder] : [],
  );
}

const describeDocument = async () => (await getDocument(new Request('http://127.0.0.1:3000/api/v1/openapi.json'), { params: Promise.resolve({}) })).json();

describe('GET /api/v1/openapi.json', () => {
  it('describes every route of the API and nothing else', async () => {
    const served = routeFiles()
      .filter((folder) => folder !== 'openapi.json/')
      .flatMap((folder) =>
        [...readFileSync(`${API}${folder}route.ts`, 'utf8').matchAll(/export const (GET|POST|PUT|PATCH|DELETE)\b/g)].map(
          ([, method]) => `${method!.toLowerCase()} /api/v1/${folder.replace(/\/$/, '').replace(/\[(\w+)\]/g, '{$1}')}`,
        ),
      );
    const { paths } = await describeDocument();
    const described = Object.entries(paths as Record<string, object>).flatMap(([path, item]) => Object.keys(item).map((method) => `${method} ${path}`));
    expect(described.sort()).toEqual(served.sort());
  });

  it('refers only to schemas it holds, each one used', async () => {
    const document = await describeDocument();
    const text = JSON.stringify(document);
    const used = new Set([...text.matchAll(/#\/components\/schemas\/(\w+)/g)].map(([, name]) => name));
    expect([...used].sort()).toEqual(Object.keys(document.components.schemas).sort());
    expect(document.openapi).toBe('3.1.0');
  });

  it('every operation with a body has an example that can be run, but those that need a plan or an import first', () => {
    const bare = OPERATIONS.filter(({ request, examples }) => request && !examples).map(({ id }) => id);
    expect(bare).toEqual(['stageRows', 'commitImport', 'changeBooked', 'movePlan', 'signOffPlan', 'recordOutcome', 'requestSheet']);
  });
});

describe('the examples run on the demo site', () => {
  const lead: UserActor = { kind: 'user', siteId: DEMO_SITE_ID, userId: demoId('person/lead@selvedge.example'), displayName: 'Lead', roles: ['lead'] };
  let token: string;
  beforeAll(async () => {
    const accounts = [{ email: 'lead@selvedge.example', displayName: 'Lead', roles: ['lead'], passwordHash: 'not used here' }];
    await seedDemo({ db: ownerDatabase(), accounts, now: new Date('2026-05-04T06:00:00Z') });
    token = (await createApiToken({ actor: lead }, { name: 'Examples', scopes: [...SCOPES], days: 1 })).secret;
  });

  async function call({ method, path, answer, status = 200 }: Operation, id: string, body?: unknown): Promise<Response> {
    const folder = path.replace('/api/v1/', '').replace(/\{(\w+)\}/g, '[$1]');
    const { [method.toUpperCase()]: handler } = (await import(`${API}${folder}/route.ts`)) as Record<string, Handler>;
    const response = await handler!(
      new Request(`http://127.0.0.1:3000${path.replace('{id}', id)}`, {
        method: method.toUpperCase(),
        headers: { authorization: `Bearer ${token}`, 'content-type': 'application/json', 'idempotency-key': randomUUID() },
        ...(body === undefined ? {} : { body: JSON.stringify(body) }),
      }),
      { params: Promise.resolve({ id }) },
    );
    const got = await response.json();
    expect({ status: response.status, problem: response.ok ? undefined : got }).toEqual({ status, problem: undefined });
    if (answer === 'application/pdf' || answer === 'nothing') throw new Error('A file is not read as JSON.');
    expect(ANSWERS[answer].safeParse(got).error?.issues).toBeUndefined();
    return response;
  }

  const idFor = ({ path }: Operation): string => {
    if (path.includes('/bookings/')) return demoId('booking/HB-2107');
    if (path.includes('/scanners/')) return demoId('scanner/A');
    if (path.includes('/protocols/')) return demoId('protocol/abdomen');
    return randomUUID();
  };

  const withExamples = OPERATIONS.flatMap((operation) =>
    Object.entries(operation.examples ?? {}).map(([name, { value }]) => [operation.id, name, operation, value] as const),
  );
  it.each(withExamples)('%s: %s', async (_id, _name, operation, value) => {
    await call(operation, idFor(operation), value);
  });

  const reading = OPERATIONS.filter(({ method, path }) => method === 'get' && !path.includes('/plans/')).map((each) => [each.id, each] as const);
  it.each(reading)('%s answers as described', async (_id, operation) => {
    await call(operation, idFor(operation));
  });

  it('a plan saved through the API is read back as described', async () => {
    const save = OPERATIONS.find(({ id }) => id === 'savePlan')!;
    const read = OPERATIONS.find(({ id }) => id === 'getPlan')!;
    const planId = randomUUID();
    await call(save, planId, save.examples!.plan!.value);
    await call(read, planId);
  });
});
