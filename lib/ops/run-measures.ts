import { mkdtemp, readdir, rm } from 'node:fs/promises';
import os from 'node:os';
import path from 'node:path';
import { pathToFileURL } from 'node:url';
import { dataFolder, ROOT, writePrivateJson } from './local-files';

interface Row {
  readonly what: string;
  readonly value: number;
  readonly unit: string;
  readonly against?: string;
  readonly aim?: string;
}

type Measure = (context: { readonly workFolder: string }) => Promise<readonly Row[]>;

/**
 * `npm run measure`: collects the rows of every module in tests/measure (`export const measure`), prints them as a table
 * and keeps them as JSON. A speed never fails a run; a module that cannot measure says why in its place.
 */
export async function runMeasures(args: readonly string[]): Promise<void> {
  const folder = path.join(ROOT, 'tests/measure');
  const files = (await readdir(folder)).filter((file) => file.endsWith('.measure.ts')).sort();
  const wanted = files.filter((file) => args.length === 0 || args.some((arg) => file.includes(arg)));
  const workFolder = await mkdtemp(path.join(os.tmpdir(), 'selvedge-measure-'));
  const rows: (Row & { module: string })[] = [];
  const notMeasured: { module: string; why: string }[] = [];
  try {
    for (const file of wanted) {
      const name = file.replace('.measure.ts', '');
      console.log(`Measuring ${name} …`);
      try {
        const { measure } = (await import(pathToFileURL(path.join(folder, file)).href)) as { measure: Measure };
        rows.push(...(await measure({ workFolder })).map((row) => ({ module: name, ...row })));
      } catch (error) {
        notMeasured.push({ module: name, why: (error as Error).message });
      }
    }
  } finally {
    await rm(workFolder, { recursive: true, force: true });
  }
  printTable(rows);
  for (const { module, why } of notMeasured) console.log(`${module}: not measured: ${why}`);
  const file = path.join(dataFolder(), 'measure.json');
  await writePrivateJson(file, { at: new Date().toISOString(), node: process.version, rows, notMeasured });
  console.log(`\nKept in ${path.relative(ROOT, file)}`);
  process.exit(0);
}

const figure = (value: number) => (Number.isFinite(value) ? Number(value.toPrecision(4)).toString() : String(value));

function printTable(rows: readonly (Row & { module: string })[]): void {
  const cells = rows.map((row) => [row.module, row.what, figure(row.value), row.unit, row.against ?? '', row.aim ?? '']);
  const table = [['module', 'what', 'value', 'unit', 'against', 'aim'], ...cells];
  const widths = table[0]!.map((_, column) => Math.max(...table.map((line) => line[column]!.length)));
  console.log();
  for (const line of table) {
    console.log(line.map((cell, column) => (column === 2 ? cell.padStart(widths[column]!) : cell.padEnd(widths[column]!))).join('  ').trimEnd());
  }
}
