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

/** The JSON body of a request. A wrong content type is refused: it is what a foreign form could send unasked. */
export async function readJson(request: Request, maxBytes: number = DEFAULT_MAX_BODY_BYTES): Promise<unknown> {
  const type = (request.headers.get('content-type') ?? '').split(';')[0]?.trim().toLowerCase();
  if (type !== 'application/json' && !type?.endsWith('+json')) throw new ServiceError('not-json');
  const bytes = await readBytes(request, maxBytes);
  try {
    return JSON.parse(new TextDecoder('utf-8', { fatal: true }).decode(bytes));
  } catch {
    throw new ServiceError('bad-request', { message: 'The body is not valid JSON in UTF-8.' });
  }
}
