import { sectionFrame } from '@/lib/physics/geometry/section-frame';
import type { Prescription } from '@/lib/physics/model/prescription';
import { screenFrame, toScreen, type ScreenPoint } from './section-frame';

/** The displayed window on the screen: its centre, the unit vectors of phase and readout, and its half-lengths. */
export interface WindowFrame {
  readonly centre: ScreenPoint;
  /** Towards the positive end of the patient axis it runs along: left, posterior or superior. */
  readonly phase: ScreenPoint;
  readonly readout: ScreenPoint;
  readonly halfPhaseMm: number;
  readonly halfReadoutMm: number;
  readonly halfAcquiredMm: number;
}

export function windowFrame(prescription: Prescription): WindowFrame {
  const screen = screenFrame(prescription);
  const section = sectionFrame(prescription);
  return {
    centre: toScreen(screen, prescription.centreMm),
    phase: toScreen(screen, section.phase),
    readout: toScreen(screen, section.readout),
    halfPhaseMm: prescription.fovPhaseMm / 2,
    halfReadoutMm: prescription.fovReadoutMm / 2,
    halfAcquiredMm: (prescription.acquiredLines * prescription.fovPhaseMm) / prescription.linesAcrossFov / 2,
  };
}

/** A point of the window given along phase and readout from its centre. */
export function inWindow(window: WindowFrame, alongPhaseMm: number, alongReadoutMm: number): ScreenPoint {
  return [
    window.centre[0] + window.phase[0] * alongPhaseMm + window.readout[0] * alongReadoutMm,
    window.centre[1] + window.phase[1] * alongPhaseMm + window.readout[1] * alongReadoutMm,
  ];
}

/** Along phase and readout from the window's centre, of a point of the picture. */
export function fromWindow(window: WindowFrame, point: ScreenPoint): readonly [number, number] {
  const du = point[0] - window.centre[0];
  const dv = point[1] - window.centre[1];
  return [du * window.phase[0] + dv * window.phase[1], du * window.readout[0] + dv * window.readout[1]];
}
