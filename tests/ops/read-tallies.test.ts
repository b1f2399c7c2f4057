import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import os from 'node:os';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { readTallies } from '@/lib/ops/read-tallies';

describe('what tests counted', () => {
  it('is the last line of a name, from every process; a line cut short is left out', async () => {
    const folder = await mkdtemp(path.join(os.tmpdir(), 'selvedge-tallies-'));
    const line = (name: string, cases: number) => JSON.stringify({ name, cases, note: '' });
    await writeFile(path.join(folder, '1.jsonl'), `${line('b', 500)}\n${line('b', 1000)}\n`);
    await writeFile(path.join(folder, '2.jsonl'), `${line('a', 7)}\n${line('c', 9).slice(0, 12)}`);
    expect(await readTallies(folder)).toEqual([{ name: 'a', cases: 7, note: '' }, { name: 'b', cases: 1000, note: '' }]);
    await rm(folder, { recursive: true });
    expect(await readTallies(folder)).toEqual([]);
  });
});
