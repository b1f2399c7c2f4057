import { ceilCount } from '../model/require-argument';

/*
 * The textbook forms, one a family; TR in seconds, counts whole, result in seconds.
 * Source: [bernstein-2004], from memory. Arguments are checked where a prescription is read (scan-time.ts).
 */

/** Spin echo, gradient echo, interleaved 2D: TR·Y_acq·averages·batches. */
export function interleavedTimeS(trS: number, lines: number, averages: number, batches: number): number {
  return trS * lines * averages * batches;
}

/** Shots of an echo train: ⌈views/ETL⌉. */
export function echoTrainShots(views: number, echoTrainLength: number): number {
  return ceilCount(views / echoTrainLength);
}

/** Echo-train spin echo (2D or 3D): TR·⌈views/ETL⌉·averages·batches. */
export function echoTrainTimeS(
  trS: number,
  views: number,
  echoTrainLength: number,
  averages: number,
  batches: number,
): number {
  return trS * echoTrainShots(views, echoTrainLength) * averages * batches;
}

/** Single-shot echo train: TR per slice·slices·averages; the train grows, not the time. */
export function singleShotTimeS(trPerSliceS: number, slices: number, averages: number): number {
  return trPerSliceS * slices * averages;
}

/** EPI: TR·shots·volumes, volumes = Σ over b-values of directions·averages. */
export function echoPlanarTimeS(trS: number, shots: number, volumes: number): number {
  return trS * shots * volumes;
}

/** Balanced, sequential 2D: TR·Y_acq·slices·averages. */
export function sequentialTimeS(trS: number, lines: number, slices: number, averages: number): number {
  return trS * lines * slices * averages;
}

/** Gradient echo 3D: (TR·N_acq + preparation·segments)·averages. */
export function gradientEcho3dTimeS(
  trS: number,
  views: number,
  averages: number,
  preparationS: number,
  segments: number,
): number {
  return (trS * views + preparationS * segments) * averages;
}
