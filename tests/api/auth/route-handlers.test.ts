import { randomUUID } from 'node:crypto';
import { describe, expect, it, vi } from 'vitest';
import * as z from 'zod';
import type { UserActor } from '@/lib/domain/access';
import { ServiceError } from '@/lib/domain/errors';
import { handlePublicRoute, handleRoute } from '@/lib/http/handle-route';
import { createApiToken } from '@/lib/services/api-token/create-api-token';
import { revokeApiToken } from '@/lib/services/api-token/revoke-api-token';
import { createTestSite } from '@/tests/support/database';
import { activePerson } from '@/tests/support/database/accounts';

// The session itself is tested beside this; here it is only whether and when it is asked.
const session = vi.hoisted(() => ({ actor: null as unknown, asked: 0 }));
vi.mock('@/lib/auth/current-actor', () => ({
  currentActor: async () => {
    session.asked += 1;
    return session.actor;
  },
}));

const OWN = 'http://127.0.0.1:3000';
const URL_OF_ROUTE = `${OWN}/api/v1/things`;
const segment = (params: Record<string, string> = {}) => ({ params: Promise.resolve(params) });

function post(headers: Record<string, string>, body: BodyInit = '{"n":1}'): Request {
  const basic = { 'content-type': 'application/json', cookie: 'next-auth.session-token=sealed' };
  return new Request(URL_OF_ROUTE, { method: 'POST', headers: { ...basic, ...headers }, body });
}

const route = handleRoute({ body: z.object({ n: z.int() }) }, async ({ actor, body }) => ({ kind: actor.kind, n: body.n }));

async function leadWithToken() {
  const site = await createTestSite();
  const lead = await activePerson(site, 'lead');
  const made = await createApiToken({ actor: lead }, { name: 'T', scopes: ['check:run'], days: 1 });
  return { lead, ...made };
}

async function problemOf(response: Response) {
  expect(response.headers.get('content-type')).toBe('application/problem+json');
  expect(response.headers.get('cache-control')).toBe('no-store');
  const problem = await response.json();
  expect(problem).toMatchObject({ status: response.status, title: expect.any(String), type: expect.stringMatching(/^urn:selvedge:problem:/) });
  return problem;
}

describe('a request with a session', () => {
  const person: UserActor = { kind: 'user', siteId: randomUUID(), userId: randomUUID(), displayName: 'A', roles: ['lead'] };

  it.each([
    ['no Origin', {}],
    ['a foreign Origin', { origin: 'https://evil.example' }],
    ['an opaque Origin', { origin: 'null' }],
    ['another port', { origin: 'http://127.0.0.1:3001' }],
    ['another scheme', { origin: 'https://127.0.0.1:3000' }],
    ['our address as a prefix', { origin: `${OWN}.evil.example` }],
    ['our Origin, but fetched across sites', { origin: OWN, 'sec-fetch-site': 'cross-site' }],
    ['a forged Host', { host: 'evil.example', origin: 'http://evil.example' }],
  ])('is refused with %s, before the cookie is looked at', async (_, headers) => {
    session.actor = person;
    session.asked = 0;
    const response = await route(post(headers), segment());
    expect((await problemOf(response)).code).toBe('wrong-origin');
    expect(response.status).toBe(403);
    expect(session.asked).toBe(0);
  });

  it('is served with our Origin', async () => {
    session.actor = person;
    const own: Record<string, string>[] = [{ origin: OWN }, { origin: OWN, 'sec-fetch-site': 'same-origin' }];
    for (const headers of own) {
      const response = await route(post(headers), segment());
      expect([response.status, await response.json()]).toEqual([200, { kind: 'user', n: 1 }]);
    }
  });

  it('needs no Origin for reading', async () => {
    session.actor = person;
    const read = handleRoute({}, async () => ({ fine: true }));
    expect((await read(new Request(URL_OF_ROUTE, { headers: { cookie: 'next-auth.session-token=sealed' } }), segment())).status).toBe(200);
  });

  it('must be JSON, whatever a form can send', async () => {
    session.actor = person;
    for (const type of ['text/plain', 'application/x-www-form-urlencoded', 'multipart/form-data; boundary=x', '']) {
      const response = await route(post({ origin: OWN, 'content-type': type }), segment());
      expect([response.status, (await problemOf(response)).code]).toEqual([415, 'not-json']);
    }
  });

  it('is 401, not a matter of origin, when there is neither cookie nor token', async () => {
    session.actor = person;
    session.asked = 0;
    for (const headers of [{ cookie: '' }, { cookie: '', origin: OWN }]) {
      const problem = await problemOf(await route(post(headers as Record<string, string>), segment()));
      expect(problem).toMatchObject({ code: 'unauthenticated', title: expect.stringContaining('API token') });
    }
    expect(session.asked).toBe(0);
  });

  it('is 401 when the session has ended', async () => {
    session.actor = null;
    const response = await route(post({ origin: OWN }), segment());
    expect([response.status, (await problemOf(response)).code]).toEqual([401, 'unauthenticated']);
  });
});

describe('a request with a bearer token', () => {
  it('is served without Origin and without a session', async () => {
    const { secret } = await leadWithToken();
    session.asked = 0;
    const response = await route(post({ authorization: `Bearer ${secret}` }), segment());
    expect([response.status, await response.json()]).toEqual([200, { kind: 'token', n: 1 }]);
    expect(session.asked).toBe(0);
  });

  it('never falls back to the session when the token is wrong, malformed or revoked', async () => {
    const { lead, id, secret } = await leadWithToken();
    await revokeApiToken({ actor: lead }, { id });
    session.actor = lead;
    session.asked = 0;
    const wrong = [`Bearer ${secret}`, 'Bearer', 'Bearer ', `Basic ${secret}`, secret, `Bearer ${'x'.repeat(5000)}`, `Bearer ${secret} ${secret}`, ''];
    const bodies = new Set<string>();
    for (const authorization of wrong) {
      const response = await route(post({ authorization, origin: OWN }), segment());
      expect(response.status, authorization.slice(0, 30)).toBe(401);
      expect(response.headers.get('www-authenticate')).toContain('Bearer');
      bodies.add(JSON.stringify(await problemOf(response)));
    }
    expect(bodies.size).toBe(1);
    expect(session.asked).toBe(0);
  });
});

describe('the error map', () => {
  const failing = (error: unknown) => handlePublicRoute({}, async () => Promise.reject(error));
  const run = async (error: unknown) => {
    const response = await failing(error)(new Request(URL_OF_ROUTE), segment());
    return { response, problem: await problemOf(response) };
  };

  it('turns schema errors into one message per field', async () => {
    const open = handlePublicRoute({ body: z.object({ a: z.object({ b: z.int('whole numbers only') }) }) }, async () => ({}));
    const problem = await problemOf(await open(post({}, '{"a":{"b":1.5}}'), segment()));
    expect(problem).toMatchObject({ status: 422, code: 'invalid', fields: { 'a.b': 'whole numbers only' } });
  });

  it('gives an id that is no id the answer of one that does not exist', async () => {
    const one = handlePublicRoute({ params: z.object({ id: z.uuid() }) }, async () => Promise.reject(new ServiceError('not-found')));
    const odd = await problemOf(await one(new Request(URL_OF_ROUTE), segment({ id: "' or true --" })));
    const missing = await problemOf(await one(new Request(URL_OF_ROUTE), segment({ id: randomUUID() })));
    expect(odd).toEqual(missing);
    expect(odd.status).toBe(404);
  });

  it('keeps an unexpected error to itself and gives a number that is in the log', async () => {
    const lines: string[] = [];
    const log = vi.spyOn(console, 'error').mockImplementation((line: string) => void lines.push(line));
    const pg = Object.assign(new Error('duplicate key value'), { detail: 'Key (email)=(ada@people.example)', code: '23505' });
    const { problem } = await run(pg);
    log.mockRestore();
    expect(problem).toMatchObject({ status: 500, code: 'unexpected' });
    expect(JSON.stringify(problem)).not.toMatch(/duplicate|ada@/);
    expect(lines).toHaveLength(1);
    expect(lines[0]).toContain(problem.incidentId);
    expect(lines[0]).not.toContain('ada@people.example');
  });

  it('says "try again" when the database is away, and when to', async () => {
    const log = vi.spyOn(console, 'error').mockImplementation(() => {});
    const { problem } = await run(Object.assign(new Error('connect'), { code: 'ECONNREFUSED' }));
    log.mockRestore();
    expect(problem).toMatchObject({ status: 503, code: 'unavailable' });
    const { response } = await run(new ServiceError('too-many', { retryAfterSeconds: 2.2 }));
    expect([response.status, response.headers.get('retry-after')]).toEqual([429, '3']);
  });
});

describe('the body', () => {
  const open = handlePublicRoute({ body: z.unknown(), maxBodyBytes: 100 }, async ({ body }) => ({ body }));

  it('is refused when it announces too much, and when it sends more than it announced', async () => {
    const big = JSON.stringify('x'.repeat(200));
    const stream = new ReadableStream({
      start(controller) {
        for (let n = 0; n < 300; n++) controller.enqueue(new TextEncoder().encode('x'));
        controller.close();
      },
    });
    const streamed = new Request(URL_OF_ROUTE, {
      method: 'POST',
      headers: { 'content-type': 'application/json', 'content-length': '5' },
      body: stream,
      duplex: 'half',
    } as RequestInit);
    for (const request of [post({ 'content-length': '5000' }, big), post({}, big), streamed]) {
      expect((await problemOf(await open(request, segment()))).code).toBe('too-large');
    }
    const fits = JSON.stringify('x'.repeat(98));
    expect(await (await open(post({}, fits), segment())).json()).toEqual({ body: 'x'.repeat(98) });
  });

  it('is refused when it nests deeper than anything we take, before anything reads it', async () => {
    const nested = (levels: number) => '['.repeat(levels) + ']'.repeat(levels);
    const strict = handlePublicRoute({ body: z.strictObject({ name: z.string() }), maxBodyBytes: 1_000_000 }, async () => undefined);
    const any = handlePublicRoute({ body: z.unknown(), maxBodyBytes: 1_000_000 }, async () => undefined);
    for (const deep of [nested(65), nested(400_000), '{"a":'.repeat(65) + '1' + '}'.repeat(65)]) {
      for (const route of [strict, any]) expect((await problemOf(await route(post({}, deep), segment()))).code).toBe('bad-request');
    }
    expect((await any(post({}, nested(64)), segment())).status).toBe(204);
    expect((await any(post({}, `[${'[],'.repeat(1000)}1]`), segment())).status).toBe(204);
  });

  it('is refused when it is no JSON or no UTF-8', async () => {
    for (const body of ['{', '', new Uint8Array([0x22, 0xff, 0x22])]) {
      expect((await problemOf(await open(post({}, body as BodyInit), segment()))).code).toBe('bad-request');
    }
  });
});
