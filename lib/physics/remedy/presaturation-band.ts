import { b1ScaleOf, presaturatedWeight } from '../body/presaturated-weight';
import type { Case } from '../model/case';
import { figure, OPPOSITE_SIDE } from '../assess/words';
import type { Prescription, PresaturationBand } from '../model/prescription';
import { changed, NOTHING_TO_CHANGE, refused, withPrescription, type Change } from './change';

/** What playing one band adds to every slice: its pulse, spoiling and the delay before excitation, ms. */
const BAND_TIME_MS = 12;
const DELAY_MS = 10;

/** Where the band's time goes; undefined for a steady state that nothing may interrupt. */
function bandTiming(p: Prescription): Partial<Prescription> | undefined {
  if (p.family === 'balanced') return undefined;
  if (p.family === 'gradient-echo-3d') {
    return p.segments > 0 ? { preparationMs: p.preparationMs + BAND_TIME_MS } : undefined;
  }
  return p.slices.mode === 'slab'
    ? { trMs: p.trMs + BAND_TIME_MS }
    : { sliceTimeMs: p.sliceTimeMs + BAND_TIME_MS };
}

/** What stays of fat under the band, at the flip this site's policy expects. */
function leftWords(band: PresaturationBand, { policy }: Case): string {
  const scale = b1ScaleOf(policy);
  const left = presaturatedWeight(band.nominalFlipDeg, scale, band.delayMs, policy.tissueT1Ms.fat);
  const measured = policy.presaturationB1Scale === undefined ? ', taken as this site has not measured it' : '';
  return `${Math.round(left * 100)} % stays at a true ${figure(band.nominalFlipDeg * scale)}°${measured}`;
}

/**
 * A band over the outlying tissue on the side it comes from. It leaves the tissue's true weight behind, never nothing,
 * so whether that counts is for the solver to say. The band stays outside the displayed window and the keep-clear area.
 */
export const presaturation: Change = (given, solver) => {
  const { prescription: p } = given;
  const intruder = solver.intruder(given);
  if (intruder === undefined) return NOTHING_TO_CHANGE;
  const timing = bandTiming(p);
  if (timing === undefined) {
    return refused(
      'no-room-for-a-band',
      'This sequence runs in a steady state without preparation, so no band can be played.',
    );
  }
  const { side } = intruder;
  if (p.presaturation.some((band) => band.side === side)) return NOTHING_TO_CHANGE;
  const innerEdgeMm = solver.windowEdgeMm(given, side);
  const outerEdgeMm = solver.bodyEdgeMm(given, side);
  const thicknessMm = Math.ceil(outerEdgeMm - innerEdgeMm);
  if (thicknessMm <= 0) {
    return refused(
      'no-tissue-outside',
      `No tissue lies beyond the FOV on the ${side} side, so a band there has nothing to saturate.`,
    );
  }
  const band: PresaturationBand = { side, innerEdgeMm, thicknessMm, nominalFlipDeg: 90, delayMs: DELAY_MS };
  return changed(
    withPrescription(given, { presaturation: [...p.presaturation, band], ...timing }),
    `${figure(thicknessMm)} mm band on the ${side} side: more SAR and ${BAND_TIME_MS} ms more a slice`,
    `Fold from the ${side} onto the ${OPPOSITE_SIDE[side]} side is dimmed, not removed: ${leftWords(band, given)}`,
  );
};
