import type { RangeMm, Side } from '../model/axes';
import type { PartKind } from '../model/patient';
import type { SectionFrame } from '../geometry/section-frame';

/** A point of a section: (readout, phase) in section coordinates, mm (see SectionFrame). */
export type SectionPoint = readonly [number, number];
/** A closed outline; the last point is not repeated. */
export type SectionRing = readonly SectionPoint[];

/** One piece, or the part of it whose place is certain or is not. */
export interface PlacedRings {
  readonly source: readonly SectionRing[];
  readonly landed: readonly SectionRing[];
  readonly inKeepClear: readonly SectionRing[];
}

/** What lies partly beyond the scanner's usable FOV, told apart: there the scanner maps it wrongly before it folds. */
export interface ByPlace {
  readonly certain: PlacedRings;
  readonly uncertain: PlacedRings;
}

export interface TissueDrawing {
  /** Stable: "tissue/<part>". */
  readonly name: string;
  readonly part: string;
  readonly kind: PartKind;
  readonly estimated: boolean;
  /** Some of it lies beyond the scanner's usable FOV. */
  readonly placeUncertain: boolean;
  /** Where place is uncertain and the part is a solid: its outline within the usable FOV, and beyond it. */
  readonly withinUsable?: readonly SectionRing[];
  readonly beyondUsable?: readonly SectionRing[];
  /** Even-odd: an inner ring is a hole. Empty where the section misses the part. */
  readonly rings: readonly SectionRing[];
}

/** Tissue that is seen in the wrong place: where it is, and where it lands (the same outline, moved). */
export interface PieceDrawing {
  /** Stable: "piece/<part>/<order>" for fold in phase; "/<slice order>" follows when it came along the slab. */
  readonly name: string;
  readonly part: string;
  readonly estimated: boolean;
  /** Side of the patient it came from. */
  readonly side: Side;
  /** n of fold(p) = p + n·W along phase. */
  readonly order: number;
  /** Slab only: 0 when it folds within its own partition. */
  readonly sliceOrder: number;
  /** |n|·W (or, with n = 0, |j|·W_z), mm; for displaced fat |n + κ|·W. */
  readonly distanceMm: number;
  /** EPI: fat, displaced by so much along phase (signed) before it folded; the name then ends in "/fat-low" or "/fat-high". */
  readonly fatDisplacedMm?: number;
  readonly placeUncertain: boolean;
  /** Where it is; for a sliceOrder ≠ 0 its outline in the section it came from. */
  readonly source: readonly SectionRing[];
  /** Where it lands, cropped to the displayed window. */
  readonly landed: readonly SectionRing[];
  /** The part of `landed` inside the keep-clear area (without margin). */
  readonly inKeepClear: readonly SectionRing[];
  /** Set where place is uncertain: the same outlines told apart. */
  readonly byPlace?: ByPlace;
}

/** A ghost of image-domain unfolding: tissue beyond the acquired width shown again at full brightness. */
export interface GhostDrawing {
  /** Stable: "ghost/<part>/<low|high>/<m>/<m along the slab>". */
  readonly name: string;
  readonly part: string;
  readonly estimated: boolean;
  readonly side: Side;
  /** Ghost at p + m·W/R. */
  readonly multiple: number;
  readonly sliceMultiple: number;
  readonly distanceMm: number;
  /** As in PieceDrawing. */
  readonly fatDisplacedMm?: number;
  readonly placeUncertain: boolean;
  readonly source: readonly SectionRing[];
  readonly landed: readonly SectionRing[];
  readonly inKeepClear: readonly SectionRing[];
  readonly byPlace?: ByPlace;
}

export interface SectionDrawing {
  readonly frame: SectionFrame;
  readonly sliceOffsetMm: number;
  readonly acquiredLines: number;
  readonly acquiredWidthMm: number;
  readonly displayedReadoutMm: RangeMm;
  readonly displayedPhaseMm: RangeMm;
  readonly acquiredPhaseMm: RangeMm;
  readonly tissue: readonly TissueDrawing[];
  /** Cut of the keep-clear area with this section, not cropped to the window; empty when the section misses it. */
  readonly keepClear: SectionRing;
  /** The same, grown by the margin (tissue moves by it, so this is what must stay free of the tissue as measured). */
  readonly keepClearWithMargin: SectionRing;
  readonly mustStayDisplayed: SectionRing;
  readonly pieces: readonly PieceDrawing[];
  readonly ghosts: readonly GhostDrawing[];
}
