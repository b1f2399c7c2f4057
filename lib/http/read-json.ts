import { ServiceError } from '@/lib/domain/errors';

export const DEFAULT_MAX_BODY_BYTES = 1_048_576;

function tooLarge(maxBytes: number): ServiceError {
  return new ServiceError('too-large', { message: `At most ${maxBytes} bytes are accepted here.` });
}

/** Reads at most `maxBytes`, whatever the length header claims. */
async function readBytes(request: Request, maxBytes: number): Promise<Uint8Array> {
  const announced = Number(request.headers.get('content-length') ?? 0);
  if (announced > maxBytes) throw tooLarge(maxBytes);
  if (!request.body) return new Uint8Array();
  const chunks: Uint8Array[] = [];
  let size = 0;
  const reader = request.body.getReader();
  for (;;) {
    const { done, value } = await reader.read();
    if (done) break;
    size += value.byteLength;
    if (size > maxBytes) {
      await reader.cancel();
      throw tooLarge(maxBytes);
    }
    chunks.push(value);
  }
  return Buffer.concat(chunks);
}

/** Nothing we take goes a quarter as deep; what reads a value inside a value calls itself, and a thousandfold nest would end it. */
const MOST_NESTED = 64;

const isHolder = (value: unknown): value is object => typeof value === 'object' && value !== null;

/** Level by level, so that the question itself cannot nest. */
function isNestedTooDeep(value: unknown): boolean {
  let level = [value].filter(isHolder);
  for (let depth = 0; depth < MOST_NESTED && level.length > 0; depth += 1) {
    const next: object[] = [];
    for (const each of level) for (const inner of Object.values(each)) if (isHolder(inner)) next.push(inner);
    level = next;
  }
  return level.length > 0;
}

/** The JSON body of a request. A wrong content type is refused: it is what a foreign form could send unasked. */
export async function readJson(request: Request, maxBytes: number = DEFAULT_MAX_BODY_BYTES): Promise<unknown> {
  const type = (request.headers.get('content-type') ?? '').split(';')[0]?.trim().toLowerCase();
  if (type !== 'application/json' && !type?.endsWith('+json')) throw new ServiceError('not-json');
  const bytes = await readBytes(request, maxBytes);
  let value: unknown;
  try {
    value = JSON.parse(new TextDecoder('utf-8', { fatal: true }).decode(bytes));
  } catch {
    throw new ServiceError('bad-request', { message: 'The body is not valid JSON in UTF-8.' });
  }
  if (isNestedTooDeep(value)) throw new ServiceError('bad-request', { message: `The body is nested too deep; allowed: ${MOST_NESTED} levels.` });
  return value;
}
