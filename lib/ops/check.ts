import { readFile } from 'node:fs/promises';
import { text as readText } from 'node:stream/consumers';
import { LocalError } from '@/db/local';
import { ServiceError } from '@/lib/domain/errors';
import { checkCase, renderAnswer } from '@/lib/services/check/check-case';

const USAGE = 'npm run check -- case.json ("-" reads standard input)';

/** The case could not be read at all; 1 is kept for a case that was read and refused. */
const EXIT_UNREADABLE = 2;

function unreadable(message: string): LocalError {
  process.exitCode = EXIT_UNREADABLE;
  return new LocalError(message);
}

async function readInput(file: string): Promise<unknown> {
  const name = file === '-' ? 'Standard input' : file;
  // The stream and not /dev/stdin: that name cannot be opened when the input is a socket.
  const reading = file === '-' ? readText(process.stdin) : readFile(file, 'utf8');
  const text = await reading.catch((error: Error) => {
    throw unreadable(`${name} could not be read: ${error.message}`);
  });
  try {
    return JSON.parse(text);
  } catch (error) {
    throw unreadable(`${name} is not JSON: ${(error as Error).message}`);
  }
}

function refusalOf(error: ServiceError): string {
  const lines = Object.entries(error.fields ?? {}).map(([field, message]) => `  ${field}: ${message}`);
  return [error.message, ...lines].join('\n');
}

/** `npm run check -- case.json`: the very text POST /api/v1/check answers, without a server or a database. */
export async function check(args: readonly string[]): Promise<void> {
  const [file, ...more] = args;
  if (!file || more.length > 0) {
    throw unreadable(`Give one file: ${USAGE}. Given: ${args.join(' ') || 'nothing'}.`);
  }
  const input = await readInput(file);
  try {
    process.stdout.write(renderAnswer(checkCase(input)));
  } catch (error) {
    throw error instanceof ServiceError ? new LocalError(refusalOf(error)) : error;
  }
}
