import { floorToLineGrid, mostAcquiredLines } from '../assess/line-grid';
import { figure } from '../assess/words';
import type { PaybackKind } from '../model/remedy';
import type { TargetedCase } from './change';
import { ACCELERATION_LADDER, PARTIAL_FOURIER_LADDER } from './payback-ladders';

/** One step of paying back: what it sets, mildest first, and what it brings along. */
export interface PaybackLevel {
  readonly apply: (given: TargetedCase) => TargetedCase;
  readonly sideEffect: string;
}

/** Either the levels to choose from, or why there is none. */
export type PaybackChoice =
  | { readonly outcome: 'levels'; readonly levels: readonly PaybackLevel[] }
  | { readonly outcome: 'refused'; readonly code: string; readonly text: string };

const refuse = (code: string, text: string): PaybackChoice => ({ outcome: 'refused', code, text });

function fewerAverages({ prescription: p }: TargetedCase): PaybackChoice {
  if (p.averages === 1) return refuse('one-average', 'There is only one average to give up.');
  const counts = Array.from({ length: p.averages - 1 }, (_, index) => p.averages - 1 - index);
  // An echo-planar series counts its averages in its volumes, which have to stay whole.
  const whole =
    p.family === 'echo-planar'
      ? counts.filter((count) => Number.isInteger((p.volumes * count) / p.averages))
      : counts;
  if (whole.length === 0) return refuse('volumes-not-whole', 'Fewer averages would not leave whole volumes.');
  return {
    outcome: 'levels',
    levels: whole.map((averages) => ({
      apply: (given) => ({ ...given, prescription: { ...given.prescription, averages } }),
      sideEffect: `${p.averages} → ${averages} averages: motion averages less`,
    })),
  };
}

function moreAcceleration({ prescription: p, scanner }: TargetedCase): PaybackChoice {
  const most = scanner.limits.accelerationPhaseMax;
  const factors = ACCELERATION_LADDER.filter(
    (factor) => factor > p.acceleration.factorPhase && factor <= most,
  );
  if (factors.length === 0) {
    return refuse('acceleration-over-maximum', `Acceleration is already at this scanner’s ${figure(most)}.`);
  }
  return {
    outcome: 'levels',
    levels: factors.map((factorPhase) => ({
      apply: (given) => ({
        ...given,
        prescription: {
          ...given.prescription,
          acceleration: { ...given.prescription.acceleration, factorPhase },
        },
      }),
      sideEffect: `Acceleration ${figure(p.acceleration.factorPhase)} → ${figure(factorPhase)}: more noise where copies overlap`,
    })),
  };
}

function partialFourier({ prescription: p, scanner }: TargetedCase): PaybackChoice {
  const least = scanner.limits.partialFourierMin;
  const fractions = PARTIAL_FOURIER_LADDER.filter(
    (fraction) => fraction < p.partialFourierPhase && fraction >= least,
  );
  if (fractions.length === 0) {
    return refuse(
      'partial-fourier-under-minimum',
      `Partial Fourier is already at this scanner’s ${least.toFixed(3)}.`,
    );
  }
  return {
    outcome: 'levels',
    levels: fractions.map((fraction) => ({
      apply: (given) => ({
        ...given,
        prescription: { ...given.prescription, partialFourierPhase: fraction },
      }),
      sideEffect: `Partial Fourier ${Math.round(fraction * 8)}/8: more sensitive to motion and phase errors`,
    })),
  };
}

export const PAYBACKS: Readonly<Record<PaybackKind, (given: TargetedCase) => PaybackChoice>> = {
  'fewer-averages': fewerAverages,
  'more-acceleration': moreAcceleration,
  'partial-fourier': partialFourier,
};

export const PAYBACK_KINDS: readonly PaybackKind[] = [
  'fewer-averages',
  'more-acceleration',
  'partial-fourier',
];

/** L on the grid at or below `lines`, at least as many as there are now. */
export const fillTo = (given: TargetedCase, lines: number): number | undefined => {
  const { prescription: p, scanner } = given;
  const most = Math.min(lines, mostAcquiredLines(p.linesAcrossFov, scanner.limits));
  const filled = floorToLineGrid(most, p.linesAcrossFov, scanner.lineStep);
  return filled === undefined || filled <= p.acquiredLines ? undefined : filled;
};
