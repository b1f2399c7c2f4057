import { LocalError } from '@/db/local';
import { EnvironmentError } from '@/lib/env';

type Command = (args: readonly string[]) => Promise<void>;

/** Loaded when asked for, so that "check" never loads a web server and "start" never loads a test runner. */
const COMMANDS: Record<string, () => Promise<Command>> = {
  start: async () => (await import('./start')).start,
  dev: async () => (await import('./start')).startForDevelopment,
  test: async () => (await import('./run-tests')).runTests,
  'test-long': async () => (await import('./run-long-tests')).runLongTests,
  measure: async () => (await import('./run-measures')).runMeasures,
  mutate: async () => (await import('@/tests/mutation/mutate')).mutate,
  check: async () => (await import('./check')).check,
  'db-migrate': async () => (await import('./database-commands')).migrate,
  'db-seed': async () => (await import('./database-commands')).seed,
  'db-types': async () => (await import('./database-commands')).generateTypes,
  'db-psql': async () => (await import('./database-commands')).openPsql,
};

/** Runs one command of package.json. What a person can put right is said in words; the rest keeps its stack. */
export async function runCommand(name: string, args: readonly string[]): Promise<void> {
  const load = COMMANDS[name];
  if (!load) throw new Error(`No command "${name}"`);
  try {
    await (await load())(args);
  } catch (error) {
    if (error instanceof LocalError || error instanceof EnvironmentError) console.error(`\n${error.message}\n`);
    else if ((error as NodeJS.ErrnoException).code === 'ENOSPC') console.error(`\nThe disk is full: ${String(error)}\n`);
    else console.error(error);
    process.exitCode ||= 1;
  }
}
