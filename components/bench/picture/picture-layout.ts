import { windowFrame } from '@/components/schematic/scene/window-frame';
import { screenAxes } from '@/components/schematic/scene/section-frame';
import type { Bounds } from '@/components/schematic/scene/scene';
import { joinBounds } from '@/components/schematic/scene/rings';
import type { Prescription } from '@/lib/physics/model/prescription';

/** Room round the pictures for the letters, mm. */
const PAD_MM = 26;

/** The displayed window as a picture lies on the screen, mm: an in-plane rotation turns the body in it, not the window. */
export function pictureBox(prescription: Prescription): Bounds {
  const { centre, halfPhaseMm, halfReadoutMm } = windowFrame(prescription);
  const upright = prescription.phaseAxis === screenAxes(prescription.plane).vertical;
  const [halfU, halfV] = upright ? [halfReadoutMm, halfPhaseMm] : [halfPhaseMm, halfReadoutMm];
  return { left: centre[0] - halfU, right: centre[0] + halfU, top: centre[1] - halfV, bottom: centre[1] + halfV };
}

/** Both pictures in one frame: what lies at one place of the body lies at one place of the screen. */
export function pictureBounds(now: Prescription, tried: Prescription | undefined): Bounds {
  const all = joinBounds(pictureBox(now), tried ? pictureBox(tried) : null);
  return { left: all.left - PAD_MM, right: all.right + PAD_MM, top: all.top - PAD_MM, bottom: all.bottom + PAD_MM };
}
