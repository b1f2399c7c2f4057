import { unfoldingRule } from '../acceleration/unfolding-rule';
import { geometryCase } from '../assess/assess';
import { slabWeightFor } from '../assess/geometry-class';
import { b1ScaleOf, presaturatedWeight } from '../body/presaturated-weight';
import { fatWaterShiftHz } from '../constants/larmor';
import { sectionFrame, type SectionFrame } from '../geometry/section-frame';
import { AXIS_SIDES, AXIS_VECTOR, dot } from '../geometry/vector';
import type { PatientAxis, Vec3 } from '../model/axes';
import type { Case } from '../model/case';
import { DomainError } from '../model/domain-error';
import type { Prescription, PresaturationBand } from '../model/prescription';
import { fatShares } from '../fold/fat-shares';
import { foldOntoRow, type RowSampling } from './fold-row';
import { noisyMagnitude } from './noise';
import { paintLayers, type PaintLayer } from './paint-layers';
import { resample, type Grid } from './resample';
import { rowInterval, topSegments, type RowSegment } from './row-intervals';
import { FAT_LEFT_BY_SUPPRESSION, tissueSignal } from './tissue-signal';
import { RELAXATION } from './tissues';

export interface ImageOptions {
  /** Which slice or partition, from the FOV centre along the slice axis [mm]; default 0. */
  readonly sliceOffsetMm?: number;
  /** SNR relative to the picture it is compared with, > 0; default 1. */
  readonly relativeSnr?: number;
  /** Noise of the picture at relative SNR 1, as a share of white; default 0.035; 0 for none. */
  readonly noiseShare?: number;
  readonly seed?: number;
  /** Pixels along the longer side of the picture, 16 to 1024; default 256. */
  readonly sizePx?: number;
}

export interface SimulatedImage {
  readonly widthPx: number;
  readonly heightPx: number;
  /** Row by row from the top; brightness with white at 1, may exceed it where signals add up. */
  readonly values: Float32Array;
  /** Patient axes left to right and top to bottom; along S–I the top is superior, otherwise the low end comes first. */
  readonly horizontalAxis: PatientAxis;
  readonly verticalAxis: PatientAxis;
  readonly acquiredWidthMm: number;
}

/** Slab wrap darker than this share is left out of the picture. */
const FAINT = 0.004;
/** Slabs looked for on either side. */
const SLAB_ORDERS = [0, 1, -1, 2, -2, 3, -3];

interface Scene {
  readonly given: Case;
  readonly frame: SectionFrame;
  readonly layers: readonly PaintLayer[];
  readonly signals: readonly number[];
  readonly grid: Grid;
}

const bandNormal = ({ side }: PresaturationBand): Vec3 => {
  const axis = (Object.keys(AXIS_SIDES) as PatientAxis[]).find((name) => AXIS_SIDES[name].includes(side))!;
  const sign = AXIS_SIDES[axis][1] === side ? 1 : -1;
  return [AXIS_VECTOR[axis][0] * sign, AXIS_VECTOR[axis][1] * sign, AXIS_VECTOR[axis][2] * sign];
};

/** Cuts stretches where presaturation bands begin and end, so that each lies wholly inside or outside every band. */
function cutAtBands(segments: readonly RowSegment[], edges: readonly number[]): readonly RowSegment[] {
  return edges.reduce<readonly RowSegment[]>(
    (pieces, at) =>
      pieces.flatMap((piece) =>
        at > piece.fromMm && at < piece.toMm
          ? [
              { ...piece, toMm: at },
              { ...piece, fromMm: at },
            ]
          : [piece],
      ),
    segments,
  );
}

/** One row's tissue put where it is seen, with what a slab order lets through. */
function paintRow(scene: Scene, sampling: RowSampling, row: number, sliceMm: number, share: number): void {
  const { given, frame, layers, signals, grid } = scene;
  const { prescription: p, scanner } = given;
  const r = frame.centreReadoutMm - p.fovReadoutMm / 2 + ((row + 0.5) * p.fovReadoutMm) / grid.rows;
  const normals = p.presaturation.map(bandNormal);
  const b1Scale = b1ScaleOf(given.policy);
  const offsets = normals.map(
    (normal) => dot(normal, frame.readout) * r + dot(normal, frame.slice) * sliceMm,
  );
  const edges = p.presaturation.flatMap((band, i) => {
    const slope = dot(normals[i]!, frame.phase);
    return Math.abs(slope) < 1e-9
      ? []
      : [
          (band.innerEdgeMm - offsets[i]!) / slope,
          (band.innerEdgeMm + band.thicknessMm - offsets[i]!) / slope,
        ];
  });
  const segments = cutAtBands(topSegments(layers.map(({ solid }) => rowInterval(solid, r, sliceMm))), edges);
  const fatHz = fatWaterShiftHz(scanner.fieldStrengthT);
  const echoPlanar = p.family === 'echo-planar';
  // One picture has one polarity of the blips: towards the low end where it is not known.
  const [fatShare = 0] = fatShares(
    { ...p, fatDisplacedTowards: p.fatDisplacedTowards ?? 'low-end' },
    scanner.fieldStrengthT,
  );
  const fatAlongPhaseMm = fatShare * sampling.widthMm;
  const fatRows = echoPlanar ? 0 : (fatHz / p.bandwidthHzPerPixel) * (grid.rows / p.readoutMatrix);
  for (const { fromMm, toMm, layer } of segments) {
    const { tissue, weight } = layers[layer]!;
    const middle = (fromMm + toMm) / 2;
    let signal = signals[layer]! * weight * share;
    p.presaturation.forEach((band, i) => {
      const along = offsets[i]! + dot(normals[i]!, frame.phase) * middle;
      if (along < band.innerEdgeMm || along > band.innerEdgeMm + band.thicknessMm) return;
      signal *= presaturatedWeight(band.nominalFlipDeg, b1Scale, band.delayMs, RELAXATION[tissue].t1Ms);
    });
    if (tissue === 'fat' && p.fatSuppressed) {
      // Suppression works where the field was evened out, which is the picture; rim fat beyond it stays bright.
      const seen = Math.abs(middle - frame.centrePhaseMm) < p.fovPhaseMm / 2;
      if (seen) signal *= FAT_LEFT_BY_SUPPRESSION;
    }
    if (signal <= 0) continue;
    const shifted = tissue === 'fat' ? fatAlongPhaseMm : 0;
    const rowsOn = tissue === 'fat' ? fatRows : 0;
    const whole = Math.floor(rowsOn);
    const part = rowsOn - whole;
    for (const [step, amount] of [
      [whole, 1 - part],
      [whole + 1, part],
    ] as const) {
      const target = grid.lines[row + step];
      if (target !== undefined && amount > 0)
        foldOntoRow(target, sampling, fromMm + shifted, toMm + shifted, signal * amount);
    }
  }
}

/** White: the brightest tissue that fills a part of the picture, so that one vessel does not darken the rest. */
function whiteOf(p: Prescription, signals: readonly number[], layers: readonly PaintLayer[]): number {
  const fat = p.fatSuppressed ? 0 : tissueSignal('fat', p);
  const organs = signals.filter((_, i) => !['fluid', 'fat', 'blood'].includes(layers[i]!.tissue));
  return Math.max(1e-6, 1.15 * Math.max(...organs, 0), 0.95 * fat, 0.55 * tissueSignal('fluid', p));
}

/**
 * A picture of the section as the prescription would show it: phantom tissue with the family's contrast, chemical
 * shift along readout (along phase in EPI), EPI displacement before fold, fold and ghosts along phase; along a slab,
 * wrap with its profile; cropping, presaturation, and noise by relative SNR.
 * Sampled on the prescription's own matrix, then shown at the asked size, so a coarser voxel looks coarser.
 * @returns brightness with white at 1; the same numbers on every machine up to the last bits of a double
 * @throws DomainError "size-out-of-range", "relative-snr-not-positive", and as solving the geometry does
 * Valid: for the eye. Cartesian sampling; no ringing, no motion; phantoms are our own and nobody's anatomy.
 */
export function simulateImage(question: Case, options: ImageOptions = {}): SimulatedImage {
  const { sliceOffsetMm = 0, relativeSnr = 1, noiseShare = 0.035, seed = 1, sizePx = 256 } = options;
  if (!Number.isInteger(sizePx) || sizePx < 16 || sizePx > 1024) {
    throw new DomainError('size-out-of-range', 'sizePx', sizePx, 'a whole number from 16 to 1024');
  }
  if (!(relativeSnr > 0))
    throw new DomainError('relative-snr-not-positive', 'relativeSnr', relativeSnr, 'a number above 0');
  const given = { ...question, prescription: geometryCase(question).prescription };
  const { prescription: p } = given;
  const frame = sectionFrame(p, sliceOffsetMm);
  const layers = paintLayers(given, frame);
  const signals = layers.map(({ tissue }) => tissueSignal(tissue, p));
  const grid: Grid = {
    rows: p.readoutMatrix,
    columns: p.linesAcrossFov,
    lines: Array.from({ length: p.readoutMatrix }, () => new Float64Array(p.linesAcrossFov)),
  };
  const rule = unfoldingRule(p);
  const sampling: RowSampling = {
    centreMm: frame.centrePhaseMm,
    fovMm: p.fovPhaseMm,
    widthMm: (p.acquiredLines * p.fovPhaseMm) / p.linesAcrossFov,
    pixels: p.linesAcrossFov,
    ghostFactor: rule.kind === 'grid-ends' ? rule.factorPhase : 1,
  };
  const profile = slabWeightFor(given);
  const slabMm = p.slices.mode === 'slab' ? p.slices.acquiredPartitions * p.slices.partitionThicknessMm : 0;
  for (const order of profile === undefined ? [0] : SLAB_ORDERS) {
    const share = profile === undefined ? 1 : profile(sliceOffsetMm + order * slabMm);
    if (share < FAINT) continue;
    for (let row = 0; row < grid.rows; row++) {
      paintRow({ given, frame, layers, signals, grid }, sampling, row, frame.sliceMm + order * slabMm, share);
    }
  }
  const white = whiteOf(p, signals, layers);
  const picture = resample(grid, frame, p, sizePx);
  const sigma = noiseShare / relativeSnr;
  const values = picture.values.map((value, index) => noisyMagnitude(value / white, sigma, index, seed));
  return { ...picture, values, acquiredWidthMm: sampling.widthMm };
}

/** Brightness as grey levels 0–255, white at 1. */
export function toGreyLevels(values: Float32Array): Uint8ClampedArray {
  const levels = new Uint8ClampedArray(values.length);
  for (let i = 0; i < values.length; i++) levels[i] = Math.round(Math.min(1, values[i]!) * 255);
  return levels;
}
