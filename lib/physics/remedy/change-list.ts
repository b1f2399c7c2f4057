import type { RemedyKind } from '../model/remedy';
import { armsUp } from './arms-up';
import type { Change } from './change';
import { coilElements } from './coil-elements';
import { largerFovSameMatrix, largerFovSameVoxel } from './larger-fov';
import { phaseOversampling } from './phase-oversampling';
import { presaturation } from './presaturation-band';
import { recentre } from './recentre';
import { regroupBreathHolds } from './regroup-breath-holds';
import { dropEndPartitions, enlargeSlab, sharperPulse, sliceOversampling } from './slab-changes';
import { swapDirection } from './swap-direction';

/** One way of making a change; a kind can be sized in more than one way. */
export interface ChangeOption {
  readonly kind: RemedyKind;
  /** Part of a remedy's key. */
  readonly key: string;
  /** 'setting' changes come first and shape the geometry; 'sizing' ones are sized in it, after any payback. */
  readonly stage: 'setting' | 'sizing';
  readonly change: Change;
}

const option = (
  kind: RemedyKind,
  stage: ChangeOption['stage'],
  change: Change,
  key: string = kind,
): ChangeOption => ({
  kind,
  key,
  stage,
  change,
});

/**
 * Every change a remedy can be made of, in the order they are applied. A pair is applied in this order whatever its
 * order of naming, so each pair occurs once.
 */
export const CHANGE_OPTIONS: readonly ChangeOption[] = [
  option('arms-up', 'setting', armsUp),
  option('swap', 'setting', swapDirection),
  option('recentre', 'setting', recentre),
  option('coil-elements', 'setting', coilElements),
  option('presaturation', 'setting', presaturation),
  option('sharper-pulse', 'setting', sharperPulse),
  option('regroup-breath-holds', 'setting', regroupBreathHolds),
  option('enlarge-slab', 'sizing', enlargeSlab),
  option('slice-oversampling', 'sizing', sliceOversampling),
  option('drop-end-partitions', 'sizing', dropEndPartitions),
  option('larger-fov-same-matrix', 'sizing', largerFovSameMatrix),
  option('larger-fov-same-voxel', 'sizing', largerFovSameVoxel),
  option('phase-oversampling', 'sizing', phaseOversampling('first-clean')),
  option(
    'phase-oversampling',
    'sizing',
    phaseOversampling('always-clean'),
    'phase-oversampling:always-clean',
  ),
];

const isLargerFov = (kind: RemedyKind): boolean => kind.startsWith('larger-fov');

/** Two changes that make sense together: different kinds, and the FOV is enlarged one way only. */
const goTogether = (a: ChangeOption, b: ChangeOption): boolean =>
  a.kind !== b.kind && !(isLargerFov(a.kind) && isLargerFov(b.kind));

/** Changes made together, in the order they are applied, by stage. */
export interface ChangeSet {
  readonly options: readonly ChangeOption[];
  readonly settings: readonly Change[];
  readonly sizings: readonly Change[];
  readonly oversamplesPhase: boolean;
}

function changeSet(...options: readonly ChangeOption[]): ChangeSet {
  const of = (stage: ChangeOption['stage']): Change[] =>
    options.filter((one) => one.stage === stage).map((one) => one.change);
  return {
    options,
    settings: of('setting'),
    sizings: of('sizing'),
    oversamplesPhase: options.some((one) => one.kind === 'phase-oversampling'),
  };
}

/** No change, every single one, every pair that makes sense. */
export const CHANGE_SETS: readonly ChangeSet[] = [
  changeSet(),
  ...CHANGE_OPTIONS.map((single) => changeSet(single)),
  ...CHANGE_OPTIONS.flatMap((first, index) =>
    CHANGE_OPTIONS.slice(index + 1)
      .filter((second) => goTogether(first, second))
      .map((second) => changeSet(first, second)),
  ),
];
