import { execFileSync, spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

import { type ComplexArray, readCfl, writeCfl } from './cfl';

/** True where Debian's package `bart` is installed. */
export function bartIsInstalled(): boolean {
  return spawnSync('bart', ['version'], { stdio: 'ignore' }).status === 0;
}

/** Runs toolbox commands in a folder of its own, removed at the end. */
export class Bart {
  private readonly folder = mkdtempSync(join(tmpdir(), 'selvedge-bart-'));

  run(...args: string[]): void {
    execFileSync('bart', args, { cwd: this.folder, stdio: ['ignore', 'ignore', 'pipe'] });
  }

  write(name: string, array: ComplexArray): void {
    writeCfl(join(this.folder, name), array);
  }

  read(name: string): ComplexArray {
    return readCfl(join(this.folder, name));
  }

  close(): void {
    rmSync(this.folder, { recursive: true, force: true });
  }
}
