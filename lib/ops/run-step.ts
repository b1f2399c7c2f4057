import { type ChildProcess, spawn } from 'node:child_process';
import { ROOT } from './local-files';

const running = new Set<ChildProcess>();
let interrupted: NodeJS.Signals | null = null;

/** Ctrl-C and SIGTERM reach every step that runs, with all it started, and then us. */
export function stopStepsOnSignal(): void {
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) {
    process.on(signal, () => {
      interrupted ??= signal;
      for (const child of running) if (child.pid) signalGroup(child.pid, 'SIGTERM');
    });
  }
}

export const wasInterrupted = () => interrupted !== null;

function signalGroup(pid: number, signal: NodeJS.Signals): void {
  try {
    process.kill(-pid, signal);
  } catch {
    // Gone already.
  }
}

/** Runs a Node program with its output passed on. Resolves with its exit code; a signal counts as 1. */
export function runStep(args: readonly string[], env: Record<string, string | undefined> = {}): Promise<number> {
  return new Promise((resolve) => {
    const child = spawn(process.execPath, [...args], {
      cwd: ROOT,
      env: { ...process.env, ...env },
      detached: true,
      stdio: ['ignore', 'inherit', 'inherit'],
    });
    running.add(child);
    const finish = (code: number) => {
      running.delete(child);
      if (child.pid) signalGroup(child.pid, 'SIGKILL');
      resolve(code);
    };
    child.once('error', (error) => {
      console.error(error.message);
      finish(1);
    });
    child.once('exit', (code) => finish(code ?? 1));
  });
}
