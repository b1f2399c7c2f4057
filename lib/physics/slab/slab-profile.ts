import { DomainError } from '../model/domain-error';
import type { SlabProfile, SlabProfileSpec } from './slab-types';
import { SlabResponse } from './slab-response';
import { spoiledSignal } from './steady-state';

/** Skirts are looked for up to here, in slab thicknesses from the centre. */
const SEARCH_END = 4;
/** Responses kept; one is a few tens of kilobytes. */
const KEPT = 48;

// A pure cache: the key is every parameter the value depends on, so it never changes an answer, only its time.
const responses = new Map<string, SlabResponse>();

function responseFor(timeBandwidthProduct: number, flipDeg: number): SlabResponse {
  const key = `${timeBandwidthProduct}/${flipDeg}`;
  const known = responses.get(key);
  if (known) {
    // Re-inserted as the newest, so that the oldest unused one is dropped.
    responses.delete(key);
    responses.set(key, known);
    return known;
  }
  const made = new SlabResponse(timeBandwidthProduct, flipDeg);
  responses.set(key, made);
  if (responses.size > KEPT) responses.delete(responses.keys().next().value!);
  return made;
}

function requireSpec(spec: SlabProfileSpec): void {
  const { kind, timeBandwidthProduct: tbw, flipDeg, trMs, t1Ms } = spec;
  if (kind === 'non-selective') return;
  if (!(tbw >= 1 && tbw <= 40)) {
    throw new DomainError('time-bandwidth-out-of-range', 'timeBandwidthProduct', tbw, '1 to 40');
  }
  if (!(flipDeg > 0 && flipDeg <= 150)) {
    throw new DomainError('flip-out-of-range', 'flipDeg', flipDeg, 'above 0 to 150 degrees');
  }
  if (kind === 'spoiled') {
    if (!(trMs! > 0) || !Number.isFinite(trMs))
      throw new DomainError('tr-not-positive', 'trMs', trMs, 'a number above 0 ms');
    if (!(t1Ms! > 0) || !Number.isFinite(t1Ms))
      throw new DomainError('t1-not-positive', 't1Ms', t1Ms, 'a number above 0 ms');
  }
}

/**
 * Signal across a slab relative to its centre, from a Bloch simulation of a Hamming-windowed sinc pulse:
 * single-pulse |Mxy|; spoiled |Mxy|·(1 − E1)/(1 − E1·Mz); non-selective 1.
 * @param spec timeBandwidthProduct 1–40, flipDeg above 0 to 150, TR and T1 in ms for 'spoiled'
 * @returns profile with at(z/S) (interpolated within 1e-4 of the step-by-step pulse; the continuous pulse within a
 * further 2e-5 for single-pulse) and skirtShare(threshold)
 * @throws DomainError "time-bandwidth-out-of-range", "flip-out-of-range", "tr-not-positive", "t1-not-positive"
 * Valid: one pulse shape; no relaxation during the pulse, no off-resonance (fat: shift the slab, fat-shift.ts).
 * Source: [pauly-1989], [pauly-1991]; measured in fixtures/published/slab-profile.
 */
export function slabProfile(spec: SlabProfileSpec): SlabProfile {
  requireSpec(spec);
  const { kind, timeBandwidthProduct, flipDeg } = spec;
  if (kind === 'non-selective') {
    return { kind, timeBandwidthProduct, flipDeg, at: () => 1, skirtShare: () => Number.POSITIVE_INFINITY };
  }
  const response = responseFor(timeBandwidthProduct, flipDeg);
  const trOverT1 = kind === 'spoiled' ? spec.trMs! / spec.t1Ms! : Number.POSITIVE_INFINITY;
  const signal = (zOverSlab: number): number => {
    const beta = response.betaAt(zOverSlab);
    const transverse = 2 * Math.abs(beta) * Math.sqrt(1 - beta * beta);
    return kind === 'spoiled' ? spoiledSignal(transverse, 2 * beta * beta, trOverT1) : transverse;
  };
  const centre = signal(0);
  const at = (zOverSlab: number): number => signal(zOverSlab) / centre;
  return {
    kind,
    timeBandwidthProduct,
    flipDeg,
    at,
    skirtShare: (threshold) => skirtOf(at, timeBandwidthProduct, threshold),
  };
}

/** Outermost crossing, looked for inwards from SEARCH_END and then closed in by bisection to 1e-7 of the slab. */
function skirtOf(at: (z: number) => number, timeBandwidthProduct: number, threshold: number): number {
  if (!(threshold >= 0.001 && threshold <= 0.9)) {
    throw new DomainError('threshold-out-of-range', 'threshold', threshold, '0.001 to 0.9');
  }
  // A side lobe is about 1/TBW of the slab wide: 1/32 of that misses none above the threshold by more than 1 %.
  const step = 1 / (32 * timeBandwidthProduct);
  let outer = SEARCH_END;
  while (outer > 0 && at(outer - step) <= threshold) outer -= step;
  let low = outer - step;
  let high = outer;
  while (high - low > 1e-7) {
    const middle = (low + high) / 2;
    if (at(middle) > threshold) low = middle;
    else high = middle;
  }
  return Math.max(0, (low + high) / 2 - 0.5);
}
