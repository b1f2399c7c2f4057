import { describe, expect, it } from 'vitest';
import { solveAll, type BenchEngine } from '@/components/bench/solve-all/solve-all';
import { startBench } from '@/components/bench/state/bench-state';
import { reduceBench } from '@/components/bench/state/reduce-bench';
import type { BenchDocument } from '@/components/bench/state/bench-document';
import { DEMO_PROTOCOLS } from '@/db/seed/demo-protocols';
import { DEMO_SCANNERS } from '@/db/seed/demo-scanners';
import { onScanner } from '@/lib/domain/case/lines';
import { DEFAULT_POLICY, type Patient } from '@/lib/domain/case/model';
import { keepClearOfPreset } from '@/lib/domain/protocol/keep-clear-presets';
import { assess, rankRemedies } from '@/lib/physics';

const engine: BenchEngine = {
  rank: async (question) => rankRemedies(question),
  assessAll: async (questions) => questions.map((question) => ({ assessment: assess(question) })),
};
const setting = { policy: DEFAULT_POLICY, today: '2026-05-04' };
const quiet = { onProgress: () => {}, stopped: () => false };

const measured = (value: number) => ({ value, source: 'measured' as const, spread: 0 });
function bench(arms: Patient['arms']['position'], halfBreadth = 240, halfDepth = 170): BenchDocument {
  const { scanner } = DEMO_SCANNERS.B;
  const extents = { right: halfBreadth, left: halfBreadth, anterior: halfDepth, posterior: halfDepth, superior: 250, inferior: 250 };
  return {
    patient: {
      region: 'abdomen', position: 'head-first-supine', lateralOffsetMm: 0, isocentreZMm: 0,
      extents: Object.fromEntries(Object.entries(extents).map(([side, value]) => [side, measured(value)])) as Patient['extents'],
      arms: { position: arms, breadthMm: 95, depthMm: 105, gapMm: 10 },
      breathHoldS: measured(18), breathPeriodS: measured(4),
    },
    keepClear: keepClearOfPreset('liver', extents)!,
    scanner,
    sequences: DEMO_PROTOCOLS.abdomen.sequences.map((prescription, i) => ({ id: `s${i}`, prescription: onScanner(prescription, scanner), adopted: [] })),
  };
}

describe('solve all', () => {
  it('adopts the cheapest remedy that frees the area for each that folds there, and says the change in time', async () => {
    const from = bench('up');
    const solved = (await solveAll(from, setting, engine, quiet))!;
    const before = from.sequences.map(({ prescription }) => assess({ patient: from.patient, prescription, keepClear: from.keepClear, scanner: from.scanner, policy: DEFAULT_POLICY }));
    const folding = from.sequences.filter((_, i) => before[i]!.verdict === 'fold-in-keep-clear').map(({ id }) => id);
    expect(folding.length).toBeGreaterThan(0);
    expect(solved.sequences.filter(({ remedy }) => remedy).map(({ id }) => id)).toEqual(folding);
    for (const { id, remedy, after } of solved.sequences.filter(({ remedy }) => remedy)) {
      const i = from.sequences.findIndex((sequence) => sequence.id === id);
      const { remedies } = rankRemedies({ patient: from.patient, prescription: from.sequences[i]!.prescription, keepClear: from.keepClear, scanner: from.scanner, policy: DEFAULT_POLICY });
      expect(remedy!.key).toBe(remedies.find(({ assessment }) => assessment.verdict !== 'fold-in-keep-clear' && assessment.verdict !== 'cannot-be-scanned')!.key);
      expect(after.verdict).not.toBe('fold-in-keep-clear');
    }
    const change = solved.sequences.reduce((sum, each) => sum + (each.after.time?.scanS ?? 0) - (each.before.time?.scanS ?? 0), 0);
    // Sums of the same seconds in another order: equal to the last bits.
    expect(solved.afterS - solved.beforeS).toBeCloseTo(change, 6);
  });

  it('is one step: undo takes all of it back', async () => {
    const from = bench('up');
    const solved = (await solveAll(from, setting, engine, quiet))!;
    const adopted = reduceBench(startBench(from, 's0', null), { type: 'replace-document', document: solved.document, saved: false });
    expect(adopted.document.sequences.some(({ adopted: remedies }) => remedies.length > 0)).toBe(true);
    expect(reduceBench(adopted, { type: 'undo' }).document).toBe(from);
  });

  it('where raising the arms is what one needs, all are solved with raised arms', async () => {
    const solved = (await solveAll(bench('down', 200, 120), setting, engine, quiet))!;
    for (const { after } of solved.sequences) expect(after.verdict).not.toBe('fold-in-keep-clear');
    for (const { remedy } of solved.sequences) if (remedy) expect(remedy.arms).toBe(solved.document.patient.arms.position);
  });

  it('stops when told to, and proposes nothing', async () => {
    let asked = 0;
    const counting = { ...engine, rank: async (question: Parameters<typeof rankRemedies>[0]) => ((asked += 1), rankRemedies(question)) };
    expect(await solveAll(bench('up'), setting, counting, { onProgress: () => {}, stopped: () => asked > 0 })).toBeNull();
    expect(asked).toBe(1);
  });
});
