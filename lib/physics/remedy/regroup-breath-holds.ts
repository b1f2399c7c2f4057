import { figure } from '../assess/words';
import { scanTime } from '../sequence/scan-time';
import { slicesPerTr } from '../sequence/slice-groups';
import { changed, NOTHING_TO_CHANGE, refused, withPrescription, type Change } from './change';

/** Most holds anybody is asked for in one series. */
const MOST_HOLDS = 8;

/**
 * Interleaved slices shared out over more breath-holds: fewer slices a hold let TR, and with it the hold, be shorter.
 * Sequential slices are shared out as they are timed; a 3D or echo-planar series is one hold and cannot be divided.
 */
export const regroupBreathHolds: Change = (given) => {
  const { prescription: p, patient, scanner } = given;
  if (p.breathing !== 'breath-hold') return NOTHING_TO_CHANGE;
  const limitS = patient.breathHoldS.value;
  const now = scanTime(p, patient, scanner);
  if (now.longestHoldS <= limitS) return NOTHING_TO_CHANGE;
  if (p.slices.mode === 'slab' || p.family === 'echo-planar') {
    return refused(
      'hold-not-divisible',
      `One breath-hold of ${figure(now.longestHoldS)} s cannot be divided in this family.`,
    );
  }
  if (p.family === 'balanced' || p.family === 'single-shot-echo-train') {
    return refused('slice-longer-than-hold', `One slice alone takes ${figure(now.longestHoldS)} s.`);
  }
  const { slices } = p.slices;
  for (let holds = now.breathHolds + 1; holds <= Math.min(MOST_HOLDS, slices); holds++) {
    const perHold = Math.ceil(slices / holds);
    const trMs = perHold * p.sliceTimeMs;
    // An even share can need fewer holds than asked for; that number has been tried already.
    if (trMs >= p.trMs || Math.ceil(slices / slicesPerTr(trMs, p.sliceTimeMs)) !== holds) continue;
    const planned = withPrescription(given, { trMs });
    if (scanTime(planned.prescription, patient, scanner).longestHoldS <= limitS) {
      return changed(
        planned,
        `TR ${figure(p.trMs)} → ${figure(trMs)} ms changes the contrast`,
        `${holds} breath-holds`,
      );
    }
  }
  return refused(
    'regrouping-not-enough',
    `Not even ${MOST_HOLDS} breath-holds bring one inside ${figure(limitS)} s.`,
  );
};
