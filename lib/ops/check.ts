import { readFile } from 'node:fs/promises';
import { LocalError } from '@/db/local';
import { checkCase } from '@/lib/services/check/check-case';

/** `npm run check -- case.json`: the answer of POST /api/v1/check, without a server or a database. */
export async function check(args: readonly string[]): Promise<void> {
  const [file, ...more] = args;
  if (!file || more.length > 0) {
    throw new LocalError(`Give one file: npm run check -- case.json ("-" reads standard input). Given: ${args.join(' ') || 'nothing'}.`);
  }
  const text = await readFile(file === '-' ? '/dev/stdin' : file, 'utf8').catch((error: Error) => {
    throw new LocalError(`${file} could not be read: ${error.message}`);
  });
  let input: unknown;
  try {
    input = JSON.parse(text);
  } catch (error) {
    throw new LocalError(`${file} is not JSON: ${(error as Error).message}`);
  }
  console.log(JSON.stringify(checkCase(input), null, 2));
}
