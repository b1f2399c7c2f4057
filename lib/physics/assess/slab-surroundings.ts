import { buildBody } from '../body/build-body';
import { sectionFrame, type SectionFrame } from '../geometry/section-frame';
import { keepClearRegion, regionCorners } from '../geometry/oriented-region';
import { dot } from '../geometry/vector';
import type { RangeMm } from '../model/axes';
import type { SlabSurroundings } from '../slab/assess-slab';
import type { FrozenCase } from './geometry-class';
import { partAlong } from './part-along';

/** Range of the keep-clear area along the slice axis, mm from the slab centre. */
function keepClearAlongSlab(given: FrozenCase, frame: SectionFrame): RangeMm {
  const region = given.frozen ?? keepClearRegion(given.keepClear, given.prescription);
  const along = regionCorners(region).map((corner) => dot(corner, frame.slice) - frame.sliceMm);
  return [Math.min(...along), Math.max(...along)];
}

/** Tissue along the slice axis, mm from the slab centre: the body's own extent, along z as far as coil and magnet see. */
function tissueAlongSlab(given: FrozenCase, frame: SectionFrame): RangeMm {
  const ranges = buildBody(given.patient, given.scanner).map((part) => partAlong(part, frame.slice, given));
  const low = Math.min(...ranges.map((range) => range[0]));
  const high = Math.max(...ranges.map((range) => range[1]));
  return [low - frame.sliceMm, high - frame.sliceMm];
}

/** What surrounds a slab: tissue and keep-clear area along its slice axis. */
export function slabSurroundings(given: FrozenCase): SlabSurroundings {
  const frame = sectionFrame(given.prescription, 0);
  return {
    tissue: { rangeMm: tissueAlongSlab(given, frame) },
    keepClearMm: keepClearAlongSlab(given, frame),
  };
}
