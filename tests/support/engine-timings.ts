import { assess, rankRemedies, simulateImage } from '@/lib/physics';
import type { Case } from '@/lib/physics/model/case';
import { ABDOMEN_PROTOCOL, measured, prescriptionOf, sketchCase } from './physics-cases';

/** Milliseconds of single runs; the same code is timed in Node and in a browser. */
export interface EngineTimings {
  readonly assessMs: readonly number[];
  readonly rankFiveMs: readonly number[];
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

export function engineTimings(runs: number): EngineTimings {
  const cases = Array.from({ length: 2 * runs + 200 }, (_, run) => protocolFor(run));
  const rankFiveMs = time(runs, 60, (run) => cases[run]!.forEach((given) => rankRemedies(given)));
  const assessMs = time(runs, 60, (run) => {
    assess(cases[runs + 60 + run]![2]!);
  });
  const picture = cases[0]![2]!;
  const imageMs = time(Math.ceil(runs / 4), 8, (run) => {
    simulateImage(picture, { sizePx: 256, seed: run });
  });
  const candidates = cases[0]!.reduce((sum, given) => sum + rankRemedies(given).candidates, 0);
  return { assessMs, rankFiveMs, imageMs, candidates };
}
