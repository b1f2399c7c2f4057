import { assess, rankRemedies, simulateImage } from '@/lib/physics';
import type { Case } from '@/lib/physics/model/case';
import type { SequenceFamily } from '@/lib/physics/model/prescription';
import { ABDOMEN_PROTOCOL, measured, prescriptionOf, sketchCase } from './physics-cases';

export interface SequenceTimings {
  readonly family: SequenceFamily;
  readonly assessMs: readonly number[];
  readonly rankMs: readonly number[];
  readonly candidates: number;
}

/** Milliseconds of single runs; the same code is timed in Node and in a browser. */
export interface EngineTimings {
  readonly sequences: readonly SequenceTimings[];
  readonly rankFiveMs: readonly number[];
  /** Processor time of one such ranking on average, where the host can tell: other work on the machine disturbs it less. */
  readonly rankFiveCpuMs: number | null;
  readonly imageMs: readonly number[];
  readonly candidates: number;
}

/** The five sequences of an abdomen for a patient nobody has asked about before, so that nothing is remembered. */
function protocolFor(run: number): Case[] {
  return ABDOMEN_PROTOCOL.map((family) => {
    const given = sketchCase({ prescription: prescriptionOf(family) });
    return {
      ...given,
      patient: {
        ...given.patient,
        extents: { ...given.patient.extents, anterior: measured(170 + run * 0.01) },
      },
    };
  });
}

function time(runs: number, warmUp: number, work: (run: number) => void): number[] {
  for (let run = 0; run < warmUp; run++) work(run);
  return Array.from({ length: runs }, (_, run) => {
    const begun = performance.now();
    work(warmUp + run);
    return performance.now() - begun;
  });
}

/** @param cpuMs processor time used so far, where the host can tell */
export function engineTimings(runs: number, cpuMs?: () => number): EngineTimings {
  let asked = 0;
  // Drawn up before the clock starts; each is asked once.
  const cases = Array.from({ length: 3 * runs + 300 }, (_, run) => protocolFor(run));
  const next = (): Case[] => cases[asked++]!;
  const rankFive = () => next().forEach((given) => rankRemedies(given));
  time(0, 150, rankFive);
  const used = cpuMs?.();
  const rankFiveMs = time(runs, 0, rankFive);
  const rankFiveCpuMs = cpuMs && used !== undefined ? (cpuMs() - used) / runs : null;
  const rest = Math.floor((cases.length - asked - 2) / ABDOMEN_PROTOCOL.length / 2);
  const sequences = ABDOMEN_PROTOCOL.map((family, i): SequenceTimings => {
    const assessMs = time(rest - 2, 2, () => void assess(next()[i]!));
    const rankMs = time(rest - 2, 2, () => void rankRemedies(next()[i]!));
    return { family, assessMs, rankMs, candidates: rankRemedies(cases[0]![i]!).candidates };
  });
  const picture = cases[0]![2]!;
  const imageMs = time(Math.ceil(runs / 4), 8, (run) => {
    simulateImage(picture, { sizePx: 256, seed: run });
  });
  const candidates = sequences.reduce((sum, sequence) => sum + sequence.candidates, 0);
  return { sequences, rankFiveMs, rankFiveCpuMs, imageMs, candidates };
}
