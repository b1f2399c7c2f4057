import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Prescription } from '@/lib/physics/model/prescription';
import type { LineStep, OversamplingForm, SliceOversamplingForm } from '@/lib/physics/model/scanner';
import {
  factorGiving,
  percentGiving,
  phaseOversamplingSetting,
  sliceOversamplingSetting,
} from '@/lib/presentation/oversampling-form';

const scanner = (oversamplingForm: OversamplingForm, lineStep: LineStep = { kind: 'line' }) => ({
  oversamplingForm,
  lineStep,
  sliceOversamplingForm: 'whole-partitions' as SliceOversamplingForm,
});

const prescription = (lines: number, acquired: number, extra: Partial<Prescription> = {}) =>
  ({ linesAcrossFov: lines, acquiredLines: acquired, fovPhaseMm: 300, averages: 1, slices: { mode: 'stack' }, ...extra }) as Prescription;

describe('phase oversampling in the form the scanner takes it', () => {
  it('gives the shortest percent that makes the scanner acquire the planned lines', () => {
    expect(phaseOversamplingSetting(prescription(256, 274), scanner('percent'))).toEqual({ value: '7 %', note: '274 lines' });
    expect(percentGiving(240, 252, { kind: 'line' })).toBe('5');
    expect(percentGiving(256, 256, { kind: 'line' })).toBe('0');
  });

  it('names the percent step that was set, not the effective percent that came of rounding lines up', () => {
    // 5 % of 250 is 12.5 lines: the scanner acquires 263, effectively 5.2 %.
    expect(percentGiving(250, 263, { kind: 'percent', percent: 5 })).toBe('5');
    expect(percentGiving(250, 275, { kind: 'percent', percent: 5 })).toBe('10');
  });

  it('says factor, switch and millimetres a side', () => {
    expect(phaseOversamplingSetting(prescription(240, 252), scanner('factor')).value).toBe('factor 1.05');
    expect(phaseOversamplingSetting(prescription(240, 480), scanner('doubling-switch', { kind: 'doubling' })).value).toBe('doubling on');
    expect(phaseOversamplingSetting(prescription(240, 240), scanner('doubling-switch', { kind: 'doubling' })).value).toBe('doubling off');
    expect(phaseOversamplingSetting(prescription(240, 252), scanner('mm-per-side')).value).toBe('7.5 mm a side');
  });

  it('asks for twice the averages where the switch halves them', () => {
    const setting = phaseOversamplingSetting(
      prescription(240, 480, { averages: 2 }),
      scanner('doubling-switch-halved-averages', { kind: 'doubling' }),
    );
    expect(setting.note).toBe('enter 4 averages; the scanner halves them to 2');
  });

  it('gives back the planned lines from the percent it prints, for any lines and step', () => {
    const rounded = (lines: number, percent: number, even: boolean) => {
      const whole = Math.ceil(lines * (1 + percent / 100) - 1e-9);
      return even ? whole + (whole % 2) : whole;
    };
    fc.assert(
      fc.property(fc.integer({ min: 32, max: 1024 }), fc.double({ min: 0, max: 1, noNaN: true }), fc.boolean(), (n, share, even) => {
        const lines = even ? n + (n % 2) : n;
        const acquired = rounded(lines, share * 100, even);
        const step: LineStep = even ? { kind: 'even-lines' } : { kind: 'line' };
        expect(rounded(lines, Number(percentGiving(lines, acquired, step)), even)).toBe(acquired);
        const factor = Number(factorGiving(lines, acquired, step));
        expect(rounded(lines, (factor - 1) * 100, even)).toBe(acquired);
      }),
      { seed: 20260301, numRuns: 2000 },
    );
  });

  it('finds the percent step again, for any multiple the scanner offers', () => {
    fc.assert(
      fc.property(fc.integer({ min: 32, max: 1024 }), fc.integer({ min: 0, max: 20 }), fc.constantFrom(5, 10), (lines, k, percent) => {
        const acquired = Math.ceil(lines * (1 + (k * percent) / 100) - 1e-9);
        expect(percentGiving(lines, acquired, { kind: 'percent', percent })).toBe(String(k * percent));
      }),
      { seed: 20260302, numRuns: 2000 },
    );
  });
});

describe('slice oversampling', () => {
  const slab = prescription(256, 256, {
    slices: { mode: 'slab', partitions: 64, partitionThicknessMm: 3, acquiredPartitions: 72, selective: true, droppedPartitionsPerEnd: 0 },
  });

  it('is said in whole partitions, percent or factor', () => {
    expect(sliceOversamplingSetting(slab, scanner('percent'))?.value).toBe('8 partitions more');
    expect(sliceOversamplingSetting(slab, { ...scanner('percent'), sliceOversamplingForm: 'percent' })?.value).toBe('12 %');
    expect(sliceOversamplingSetting(slab, { ...scanner('percent'), sliceOversamplingForm: 'factor' })?.value).toBe('factor 1.12');
  });

  it('does not exist for a stack of slices', () => {
    expect(sliceOversamplingSetting(prescription(256, 256), scanner('percent'))).toBeUndefined();
  });
});
