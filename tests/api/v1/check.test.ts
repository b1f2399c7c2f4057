import { execFileSync, spawnSync } from 'node:child_process';
import { readdirSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { beforeAll, describe, expect, it } from 'vitest';
import { POST } from '@/app/api/v1/check/route';
import { checkAnswerSchema } from '@/lib/schemas/case/assessment';
import { CHECK_EXAMPLES } from '@/lib/schemas/openapi/examples';
import { createTestSite } from '@/tests/support/database';
import { tokenFor } from '@/tests/support/api-token';

const ROOT = fileURLToPath(new URL('../../..', import.meta.url));
const FOLDER = `${ROOT}fixtures/files/cases/`;
const FILES = readdirSync(FOLDER);

let token: string;
beforeAll(async () => {
  token = await tokenFor(await createTestSite(), ['check:run']);
});

const send = (body: string, headers: Record<string, string> = { authorization: `Bearer ${token}` }) =>
  POST(new Request('http://127.0.0.1:3000/api/v1/check', { method: 'POST', headers: { 'content-type': 'application/json', ...headers }, body }), {
    params: Promise.resolve({}),
  });

/** The command as package.json runs it, without npm's own lines. */
const command = (args: string[], input = '') =>
  spawnSync(process.execPath, ['lib/ops/bootstrap.mjs', 'check', ...args], { cwd: ROOT, input, encoding: 'utf8' });

describe('POST /api/v1/check', () => {
  it.each(FILES)('%s: answers as described, and the command prints the same bytes without a server', async (name) => {
    const text = readFileSync(FOLDER + name, 'utf8');
    const response = await send(text);
    expect(response.status).toBe(200);
    const answer = await response.text();
    expect(checkAnswerSchema.safeParse(JSON.parse(answer)).error?.issues).toBeUndefined();
    const printed = execFileSync(process.execPath, ['lib/ops/bootstrap.mjs', 'check', FOLDER + name], {
      cwd: ROOT, encoding: 'utf8', env: { ...process.env, DATABASE_URL: undefined },
    });
    expect(printed).toBe(answer);
    expect(command(['-'], text).stdout).toBe(answer);
  });

  it('the sample files are the examples of the description', () => {
    expect(Object.fromEntries(FILES.map((name) => [name.replace('.json', ''), JSON.parse(readFileSync(FOLDER + name, 'utf8'))]))).toEqual(
      Object.fromEntries(Object.entries(CHECK_EXAMPLES).map(([name, { value }]) => [name, value])),
    );
  });

  it('equal cases have one hash, however they are written', async () => {
    const of = async (text: string) => (await (await send(text)).json()).inputHash;
    const short = '{"patient":{"breadthMm":480,"depthMm":340},"prescription":{"fovReadoutMm":480}}';
    const turned = '{"prescription":{"linesAcrossFov":256,"fovReadoutMm":480},"patient":{"depthMm":340,"breadthMm":480}}';
    expect(await of(turned)).toBe(await of(short));
    expect(await of(short.replace('340', '341'))).not.toBe(await of(short));
  });

  it('refuses with problem details that name every field', async () => {
    const response = await send('{"patient":{"breadthMm":"wide","depthMm":340,"x":1},"prescription":{"fovReadoutMm":480}}');
    expect(response.status).toBe(422);
    expect(response.headers.get('content-type')).toBe('application/problem+json');
    expect(await response.json()).toMatchObject({
      type: 'urn:selvedge:problem:invalid', status: 422,
      fields: { 'patient.breadthMm': '“wide” given; allowed: a number, 1 to 2000 mm', patient: expect.stringMatching(/^not known here: x;/) },
    });
  });

  it.each([
    ['an empty token', { authorization: '' }, '{}', 401],
    ['neither token nor session', {}, '{}', 401],
    ['a wrong token', { authorization: 'Bearer selvedge_wrong' }, '{}', 401],
  ])('%s is turned away', async (_name, headers: Record<string, string>, body, status) => {
    expect((await send(body, headers)).status).toBe(status);
  });

  it('what is not JSON, not said to be JSON, or too much of it is refused', async () => {
    const bearer = { authorization: `Bearer ${token}` };
    expect((await send('{')).status).toBe(400);
    expect((await send('{}', { ...bearer, 'content-type': 'text/plain' })).status).toBe(415);
    expect((await send(JSON.stringify('x'.repeat(300_000)))).status).toBe(413);
  });

  it('a token needs the scope', async () => {
    const reading = await tokenFor(await createTestSite(), ['bookings:read']);
    expect((await send('{}', { authorization: `Bearer ${reading}` })).status).toBe(404);
  });

  it('too many calls of one caller are told how long to wait; another caller is not slowed', async () => {
    const [busy, other] = [await tokenFor(await createTestSite(), ['check:run']), await tokenFor(await createTestSite(), ['check:run'])];
    let last = new Response();
    // The bucket holds 60 and refills two a second: 200 calls without work empty it on any machine.
    for (let i = 0; i < 200 && last.status !== 429; i += 1) last = await send('{}', { authorization: `Bearer ${busy}` });
    expect(last.status).toBe(429);
    expect(Number(last.headers.get('retry-after'))).toBeGreaterThanOrEqual(1);
    expect((await send('{}', { authorization: `Bearer ${other}` })).status).toBe(422);
  });
});

describe('npm run check', () => {
  it.each([
    ['nothing given', [], 2, 'Give one file'],
    ['two files', ['a.json', 'b.json'], 2, 'Given: a.json b.json'],
    ['a file that is not there', ['/nowhere/case.json'], 2, '/nowhere/case.json could not be read'],
  ])('%s', (_name, args, code, words) => {
    const { status, stdout, stderr } = command(args);
    expect(status).toBe(code);
    expect(stdout).toBe('');
    expect(stderr).toContain(words);
  });
  it('text that is not JSON', () => {
    expect(command(['-'], '{ "patient": ')).toMatchObject({ status: 2, stdout: '', stderr: expect.stringContaining('Standard input is not JSON') });
  });
  it('a case that cannot be taken, field by field', () => {
    const { status, stdout, stderr } = command(['-'], '{"patient":{"depthMm":340},"prescription":{"fovReadoutMm":480,"averages":0}}');
    expect({ status, stdout }).toEqual({ status: 1, stdout: '' });
    expect(stderr).toContain('prescription.averages: 0 given; allowed: a whole number, 1 to 256');
  });
});
