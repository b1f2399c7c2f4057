import type { Prescription } from '@/lib/physics/model/prescription';
import type { LineStep, Scanner } from '@/lib/physics/model/scanner';
import { formatShort } from './round';

/** What the operator sets on this scanner, in its own form, and the figure beside it. */
export interface ScannerSetting {
  /** "5 %", "factor 1.05", "doubling on", "7.5 mm a side", "8 partitions". */
  readonly value: string;
  /** What to know while setting it; empty when there is nothing. */
  readonly note: string;
}

type SamplingScanner = Pick<Scanner, 'lineStep' | 'oversamplingForm' | 'sliceOversamplingForm'>;

/** Phase oversampling in the form this scanner takes it. The stored integer of lines decides, never a percent. */
export function phaseOversamplingSetting(prescription: Prescription, scanner: SamplingScanner): ScannerSetting {
  const { linesAcrossFov: lines, acquiredLines: acquired, fovPhaseMm } = prescription;
  const linesNote = `${acquired} lines`;
  switch (scanner.oversamplingForm) {
    case 'percent':
      return { value: `${percentGiving(lines, acquired, scanner.lineStep)} %`, note: linesNote };
    case 'factor':
      return { value: `factor ${factorGiving(lines, acquired, scanner.lineStep)}`, note: linesNote };
    case 'doubling-switch':
      return { value: doublingWord(lines, acquired), note: linesNote };
    case 'doubling-switch-halved-averages':
      return {
        value: doublingWord(lines, acquired),
        // The scanner halves what is entered, so twice the averages that will be acquired must be entered.
        note:
          acquired === 2 * lines
            ? `enter ${prescription.averages * 2} averages; the scanner halves them to ${prescription.averages}`
            : linesNote,
      };
    case 'mm-per-side':
      return {
        value: `${formatShort((((acquired - lines) * fovPhaseMm) / lines) / 2, 0.1)} mm a side`,
        note: linesNote,
      };
  }
}

/** Slice oversampling of a slab in the form this scanner takes it; absent for a stack. */
export function sliceOversamplingSetting(
  prescription: Prescription,
  scanner: SamplingScanner,
): ScannerSetting | undefined {
  if (prescription.slices.mode !== 'slab') return undefined;
  const { partitions, acquiredPartitions } = prescription.slices;
  const added = acquiredPartitions - partitions;
  const note = `${acquiredPartitions} partitions acquired`;
  switch (scanner.sliceOversamplingForm) {
    case 'percent':
      return { value: `${percentGiving(partitions, acquiredPartitions, { kind: 'line' })} %`, note };
    case 'factor':
      return { value: `factor ${factorGiving(partitions, acquiredPartitions, { kind: 'line' })}`, note };
    case 'whole-partitions':
      return { value: added === 1 ? '1 partition more' : `${added} partitions more`, note };
  }
}

/**
 * The percent with the fewest decimals that makes the scanner acquire exactly these lines, so that what is set
 * gives what was planned: 274 of 256 is "7" (7 % asks for 273.92, rounded up to 274), not 7.03125.
 */
export function percentGiving(lines: number, acquired: number, step: LineStep): string {
  if (step.kind === 'percent') {
    const steps = Math.ceil(((acquired / lines - 1) * 100 - 1e-9) / step.percent - stepSlack(lines, step.percent));
    return trimmed(Math.max(0, steps) * step.percent, 2);
  }
  for (const decimals of [0, 1, 2, 3]) {
    const scale = 10 ** decimals;
    const most = Math.floor((acquired / lines - 1) * 100 * scale + 1e-6) / scale;
    for (const percent of [most, most + 1 / scale]) {
      if (percent >= 0 && linesAt(lines, percent, step) === acquired) return trimmed(percent, decimals);
    }
  }
  return trimmed((acquired / lines - 1) * 100, 3);
}

/** The same for a factor: decimals are two more than the percent's. */
export function factorGiving(lines: number, acquired: number, step: LineStep): string {
  const percent = Number(percentGiving(lines, acquired, step));
  return (1 + percent / 100).toFixed(5).replace(/0{1,3}$/, '');
}

/** A percent step rounds L up to whole lines, so the setting sits up to one line below L / N. */
function stepSlack(lines: number, stepPercent: number): number {
  return (((1 - 1e-6) / lines) * 100) / stepPercent;
}

function linesAt(lines: number, percent: number, step: LineStep): number {
  const whole = Math.ceil(lines * (1 + percent / 100) - 1e-9);
  if (step.kind === 'even-lines') return whole + (whole % 2);
  if (step.kind === 'doubling') return whole > lines ? 2 * lines : lines;
  return whole;
}

function doublingWord(lines: number, acquired: number): string {
  if (acquired === lines) return 'doubling off';
  if (acquired === 2 * lines) return 'doubling on';
  return `${acquired} of ${lines} lines, which a doubling switch cannot give`;
}

function trimmed(value: number, decimals: number): string {
  return String(Number(value.toFixed(decimals)));
}
