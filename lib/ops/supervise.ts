import { type ChildProcess, spawn } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { ROOT } from './local-files';

const EXIT_WITH_PARENT = fileURLToPath(new URL('./exit-with-parent.mjs', import.meta.url));

export interface Service {
  readonly name: string;
  readonly child: ChildProcess;
  /** Resolves when the process is gone, with how it went. */
  readonly gone: Promise<string>;
  /** The last of what it printed. */
  lastWords(): string;
}

export type Env = Record<string, string | undefined>;

/**
 * Starts a Node process in a process group of its own, so that Ctrl-C at the terminal reaches the supervisor only and
 * the supervisor stops everything in order; what the process itself starts dies with its group.
 */
export function startService(
  name: string,
  args: readonly string[],
  env: Env,
  options: { readonly quiet?: boolean } = {},
): Service {
  const child = spawn(process.execPath, ['--import', EXIT_WITH_PARENT, ...args], {
    cwd: ROOT,
    env: { ...env, SELVEDGE_SUPERVISED: '1' } as unknown as NodeJS.ProcessEnv,
    detached: true,
    stdio: ['ignore', 'pipe', 'pipe', 'ipc'],
  });
  let heard = '';
  for (const [stream, out] of [[child.stdout, process.stdout], [child.stderr, process.stderr]] as const) {
    let rest = '';
    stream?.setEncoding('utf8').on('data', (text: string) => {
      const lines = (rest + text).split('\n');
      rest = lines.pop() ?? '';
      heard = `${heard}${text}`.slice(-8000);
      if (options.quiet) return;
      for (const line of lines) if (line.trim()) out.write(`${name.padEnd(6)} ${line}\n`);
    });
  }
  const gone = new Promise<string>((resolve) => {
    child.once('error', (error) => resolve(error.message));
    child.once('exit', (code, signal) => resolve(signal ?? `exit code ${code}`));
  });
  return { name, child, gone, lastWords: () => heard };
}

function signalGroup(service: Service, signal: NodeJS.Signals): void {
  if (service.child.pid === undefined) return;
  try {
    process.kill(-service.child.pid, signal);
  } catch {
    // The group is empty: there is nothing left to stop.
  }
}

/** Asks, waits, then insists. Afterwards nothing of the group is left. */
export async function stopService(service: Service, patienceMs = 8000): Promise<void> {
  signalGroup(service, 'SIGTERM');
  const timer = setTimeout(() => signalGroup(service, 'SIGKILL'), patienceMs);
  await service.gone;
  clearTimeout(timer);
  signalGroup(service, 'SIGKILL');
}

/** Resolves with the first of the signals that end a program; later ones are swallowed while we tidy up. */
export function stopSignal(): Promise<NodeJS.Signals> {
  return new Promise((resolve) => {
    for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) process.on(signal, () => resolve(signal));
  });
}
