import type { LineStep, OversamplingForm, SliceOversamplingForm } from '@/lib/physics/model/scanner';
import type { Trajectory, Unfolding } from '@/lib/physics/model/prescription';

export const LINE_STEP_WORDS: Readonly<Record<LineStep['kind'], string>> = {
  line: 'any whole line',
  'even-lines': 'even numbers of lines',
  percent: 'steps of a percentage',
  doubling: 'none or twice, nothing between',
};

export const OVERSAMPLING_FORM_WORDS: Readonly<Record<OversamplingForm, string>> = {
  percent: 'a percentage',
  factor: 'a factor',
  'doubling-switch': 'a doubling switch',
  'doubling-switch-halved-averages': 'a doubling switch that halves the averages',
  'mm-per-side': 'millimetres a side',
};

export const SLICE_OVERSAMPLING_FORM_WORDS: Readonly<Record<SliceOversamplingForm, string>> = {
  percent: 'a percentage',
  factor: 'a factor',
  'whole-partitions': 'whole partitions',
};

export const UNFOLDING_WORDS: Readonly<Record<Unfolding, string>> = {
  unknown: 'not known (cautious rule)',
  'k-space-self-calibrating': 'in k-space, self-calibrating',
  'image-domain-grid-ends': 'in the image, grid ends at the acquired width',
  'image-domain-beyond': 'in the image, also beyond the acquired width',
};

export const TRAJECTORY_WORDS: Readonly<Record<Trajectory, string>> = {
  cartesian: 'Cartesian',
  radial: 'radial',
  spiral: 'spiral',
  'rotating-blade': 'rotating blade',
  'simultaneous-multi-slice': 'simultaneous multi-slice',
  'outer-volume-suppressed': 'outer volume suppressed',
};
