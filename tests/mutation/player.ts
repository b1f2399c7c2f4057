import { fork, type ChildProcess } from 'node:child_process';
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
      let timer = setTimeout(hang, firstAllowedMs);
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
      function hang() {
        settle('hung');
      }
      const die = () => settle('died');
      const hear = (answer: Answer) => {
        if (answer.kind !== 'begun') return settle(answer);
        clearTimeout(timer);
        timer = setTimeout(hang, answer.allowedMs);
      };
      child.on('message', hear);
      child.on('exit', die);
      child.send(request);
    });
  }

  stop(): void {
    this.child?.kill('SIGKILL');
    this.child = undefined;
  }
}
