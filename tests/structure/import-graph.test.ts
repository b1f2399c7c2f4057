import { describe, expect, it } from 'vitest';
import { type Import, importGraph } from './import-graph';
import { type ImportRule, importRules } from './import-rules.mjs';

const graph = importGraph();

/** `lib/*` is anything in lib, `lib/physics` is it and what it holds. */
const within = (file: string, folder: string) =>
  folder.endsWith('/*') ? file.startsWith(folder.slice(0, -1)) : file === folder || file.startsWith(`${folder}/`);

/** Every glob of the rules is a folder with all that it holds. */
const covers = (glob: string, file: string) => within(file, glob.replace(/\/\*\*.*$/, ''));
const holds = (rule: ImportRule, file: string) =>
  rule.files.some((glob) => covers(glob, file)) && !rule.except?.some((glob) => covers(glob, file));

function breaks(rule: ImportRule, { to, isPackage }: Import): boolean {
  if (isPackage) return rule.packages.includes(to) || (rule.onlyPackages !== undefined && !rule.onlyPackages.includes(to));
  if (rule.onlyFolders && !rule.onlyFolders.some((folder) => within(to, folder))) return true;
  if (rule.allow?.some((folder) => within(to, folder))) return false;
  return rule.never.some((folder) => within(to, folder));
}

describe('the import graph', () => {
  it('was read: it has the imports that hold the house together', () => {
    expect(graph.length).toBeGreaterThan(500);
    expect(graph).toContainEqual({ from: 'db/client/gate.ts', to: 'kysely', isPackage: true, typeOnly: false });
    expect(graph).toContainEqual({ from: 'db/client/gate.ts', to: 'db/client/pool', isPackage: false, typeOnly: false });
  });

  it.each(importRules.map((rule) => [rule.files[0], rule] as const))('keeps the rule of %s', (_, rule) => {
    const broken = graph.filter((edge) => holds(rule, edge.from) && breaks(rule, edge));
    expect(broken.map(({ from, to }) => `${from} imports ${to}`), rule.why).toEqual([]);
  });

  it('has no import of a test or of a fixture outside the tests', () => {
    // The commands in lib/ops run what the tests are made of; nothing that is served does.
    const serving = graph.filter(({ from }) => !within(from, 'tests') && !within(from, 'lib/ops'));
    const broken = serving.filter(({ to, isPackage }) => !isPackage && (within(to, 'tests') || within(to, 'fixtures')));
    expect(broken).toEqual([]);
  });

  it('has no cycle between modules that run', () => {
    const edges = new Map<string, string[]>();
    const files = new Set(graph.map(({ from }) => from));
    const resolve = (to: string) =>
      [to, `${to}.ts`, `${to}.tsx`, `${to}/index.ts`, `${to}/index.tsx`].find((file) => files.has(file));
    for (const { from, to, isPackage, typeOnly } of graph) {
      const target = isPackage || typeOnly ? undefined : resolve(to);
      if (target) edges.set(from, [...(edges.get(from) ?? []), target]);
    }
    expect(findCycle(edges)).toBeNull();
  });
});

function findCycle(edges: ReadonlyMap<string, readonly string[]>): string[] | null {
  const done = new Set<string>();
  const visit = (file: string, trail: string[]): string[] | null => {
    if (trail.includes(file)) return [...trail.slice(trail.indexOf(file)), file];
    if (done.has(file)) return null;
    for (const next of edges.get(file) ?? []) {
      const cycle = visit(next, [...trail, file]);
      if (cycle) return cycle;
    }
    done.add(file);
    return null;
  };
  for (const file of edges.keys()) {
    const cycle = visit(file, []);
    if (cycle) return cycle;
  }
  return null;
}
