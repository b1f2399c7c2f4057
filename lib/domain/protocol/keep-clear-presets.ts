import type { BodyRegion, KeepClear, PatientBox, Side } from '@/lib/domain/case/model';

/**
 * A keep-clear box for an organ, in one-sided distances from the origin. An organ does not grow with the fat around
 * it, so each side is a share of the body's extent but never more than `mostMm`. Common practice, no source.
 */
export interface KeepClearPreset {
  readonly key: string;
  readonly label: string;
  readonly regions: readonly BodyRegion[];
  /** Absent: the whole picture. Negative shares lie beyond the origin, on the other side. */
  readonly sides?: Readonly<Record<Side, { readonly shareOfExtent: number; readonly mostMm: number }>>;
}

const side = (shareOfExtent: number, mostMm: number) => ({ shareOfExtent, mostMm });

export const KEEP_CLEAR_PRESETS: readonly KeepClearPreset[] = [
  { key: 'whole-picture', label: 'Whole picture', regions: ['abdomen', 'pelvis', 'chest', 'head', 'shoulder', 'hip', 'knee', 'breast'] },
  {
    key: 'liver', label: 'Liver', regions: ['abdomen'],
    sides: { right: side(0.8, 190), left: side(0.3, 80), anterior: side(0.82, 140), posterior: side(0.62, 105), superior: side(1, 90), inferior: side(1, 90) },
  },
  {
    key: 'pancreas', label: 'Pancreas and bile ducts', regions: ['abdomen'],
    sides: { right: side(0.4, 90), left: side(0.4, 100), anterior: side(0.5, 80), posterior: side(0.35, 60), superior: side(1, 60), inferior: side(1, 60) },
  },
  {
    key: 'kidneys', label: 'Kidneys', regions: ['abdomen'],
    sides: { right: side(0.55, 130), left: side(0.55, 130), anterior: side(0.15, 30), posterior: side(0.65, 110), superior: side(1, 90), inferior: side(1, 90) },
  },
  {
    key: 'bowel', label: 'Bowel', regions: ['abdomen'],
    sides: { right: side(0.75, 180), left: side(0.75, 180), anterior: side(0.8, 140), posterior: side(0.4, 70), superior: side(1, 150), inferior: side(1, 150) },
  },
  {
    key: 'uterus-and-ovaries', label: 'Uterus and ovaries', regions: ['pelvis'],
    sides: { right: side(0.4, 90), left: side(0.4, 90), anterior: side(0.5, 80), posterior: side(0.5, 80), superior: side(1, 80), inferior: side(1, 70) },
  },
  {
    key: 'prostate', label: 'Prostate', regions: ['pelvis'],
    sides: { right: side(0.25, 50), left: side(0.25, 50), anterior: side(0.35, 50), posterior: side(0.4, 60), superior: side(1, 50), inferior: side(1, 50) },
  },
  {
    key: 'rectum', label: 'Rectum', regions: ['pelvis'],
    sides: { right: side(0.3, 65), left: side(0.3, 65), anterior: side(0.1, 20), posterior: side(0.7, 110), superior: side(1, 90), inferior: side(1, 80) },
  },
];

/** Presets a region offers, whole picture first. */
export function keepClearPresetsFor(region: BodyRegion): readonly KeepClearPreset[] {
  return KEEP_CLEAR_PRESETS.filter((preset) => preset.regions.includes(region));
}

/** The preset as a keep-clear area for a body of these extents [mm]; undefined when there is no such key. */
export function keepClearOfPreset(key: string, extentsMm: Readonly<Record<Side, number>>): KeepClear | undefined {
  const preset = KEEP_CLEAR_PRESETS.find((candidate) => candidate.key === key);
  if (!preset) return undefined;
  if (!preset.sides) return { area: { kind: 'whole-picture' }, followsWindow: false };
  const { sides } = preset;
  // Whole millimetres: nobody sets an edge finer, and typed and preset boxes then compare equal.
  const at = (name: Side) => Math.round(Math.min(sides[name].mostMm, sides[name].shareOfExtent * extentsMm[name]));
  const box: PatientBox = {
    xMm: [-at('right'), at('left')],
    yMm: [-at('anterior'), at('posterior')],
    zMm: [-at('inferior'), at('superior')],
  };
  return { area: { kind: 'box', box, label: preset.label }, followsWindow: false };
}
