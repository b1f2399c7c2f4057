import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

/** Rows of a committed CSV under fixtures/published as records of strings (quotes around fields allowed). */
export function readTable(path: string): Record<string, string>[] {
  const text = readFileSync(
    fileURLToPath(new URL(`../../../fixtures/published/${path}`, import.meta.url)),
    'utf8',
  );
  const [head, ...rows] = text.trim().split(/\r?\n/).map(splitLine);
  return rows.map((row) => Object.fromEntries(head!.map((name, i) => [name, row[i] ?? ''])));
}

function splitLine(line: string): string[] {
  return (line.match(/("([^"]*)"|[^,]*)(,|$)/g) ?? [])
    .map((field) => field.replace(/,$/, '').replace(/^"|"$/g, ''))
    .slice(0, line.split(/,(?=(?:[^"]*"[^"]*")*[^"]*$)/).length);
}
