import { fork, type ChildProcess } from 'node:child_process';
import { readFileSync } from 'node:fs';
import path from 'node:path';
import type { Answer, Request } from './play-mutants';

/** Fewer cases than the tests take by themselves: a mutant that only the ten-thousandth case finds is not well tested. */
export const COUNTS = {
  SELVEDGE_ORACLE_A: '150',
  SELVEDGE_ORACLE_A_3D: '60',
  SELVEDGE_ORACLE_B: '40',
  SELVEDGE_RANKINGS: '4',
  SELVEDGE_ELLIPSE_FFT: '10',
};

/** What /proc counts processor time in. */
const TICK_MS = 10;
/** A process that waits for more than the processor is given up after this many times what it was allowed. */
const MOST_WALL = 1000;

/** Processor time a process has had; undefined where the system does not tell. */
function processorMs(pid: number | undefined): number | undefined {
  try {
    const text = readFileSync(`/proc/${pid}/stat`, 'utf8');
    // The name before ") " may hold anything; user and system time are the 12th and 13th field after it.
    const fields = text.slice(text.lastIndexOf(') ') + 2).split(' ');
    return (Number(fields[11]) + Number(fields[12])) * TICK_MS;
  } catch {
    return undefined;
  }
}

/** A process that plays mutants one after another; one that hangs or dies is replaced. */
export class Player {
  private child: ChildProcess | undefined;

  constructor(private readonly cwd: string) {}

  private start(): ChildProcess {
    const child = fork(path.join(import.meta.dirname, 'play-mutants.ts'), {
      cwd: this.cwd,
      execArgv: ['--import', 'tsx', '--max-old-space-size=700', '--stack-size=900'],
      env: { ...process.env, ...COUNTS },
      stdio: ['ignore', 'ignore', 'ignore', 'ipc'],
    });
    // A mutant may end its process after it has answered: the next one gets a new process.
    const forget = () => {
      if (this.child === child) this.child = undefined;
    };
    child.on('exit', forget);
    child.on('error', forget);
    return child;
  }

  /** The answer, or why there is none. A process that dies is believed when it dies twice. */
  async ask(
    request: Request,
    firstAllowedMs: number,
  ): Promise<Exclude<Answer, { kind: 'begun' }> | 'hung' | 'died'> {
    const answer = await this.askOnce(request, firstAllowedMs);
    return answer === 'died' ? this.askOnce(request, firstAllowedMs) : answer;
  }

  private askOnce(
    request: Request,
    firstAllowedMs: number,
  ): Promise<Exclude<Answer, { kind: 'begun' }> | 'hung' | 'died'> {
    const child = (this.child ??= this.start());
    return new Promise((resolve) => {
      let timer: NodeJS.Timeout;
      // Others use the machine: what was allowed is processor time, so a slow hour kills no mutant.
      const allow = (allowedMs: number) => {
        const spentBefore = processorMs(child.pid);
        const last = Date.now() + MOST_WALL * allowedMs;
        const look = () => {
          const spent = processorMs(child.pid);
          const left =
            spent === undefined || spentBefore === undefined ? 0 : allowedMs - (spent - spentBefore);
          if (left <= 0 || Date.now() >= last) return settle('hung');
          timer = setTimeout(look, Math.max(left, 50));
        };
        clearTimeout(timer);
        timer = setTimeout(look, allowedMs);
      };
      const settle = (outcome: Exclude<Answer, { kind: 'begun' }> | 'hung' | 'died') => {
        clearTimeout(timer);
        child.off('message', hear);
        child.off('exit', die);
        if (outcome === 'hung' || outcome === 'died') {
          this.child = undefined;
          child.kill('SIGKILL');
        }
        resolve(outcome);
      };
      const die = () => settle('died');
      const hear = (answer: Answer) => {
        if (answer.kind !== 'begun') return settle(answer);
        allow(answer.allowedMs);
      };
      child.on('message', hear);
      child.on('exit', die);
      allow(firstAllowedMs);
      child.send(request);
    });
  }

  stop(): void {
    this.child?.kill('SIGKILL');
    this.child = undefined;
  }
}
