import { createElement, type ReactNode } from 'react';
import { renderToStaticMarkup } from 'react-dom/server';
import type * as z from 'zod';
import { describe, expect, it } from 'vitest';
import { BenchProvider, type BenchContextValue } from '@/components/bench/bench-context';
import { KeepClearPanel } from '@/components/bench/keep-clear-panel';
import { PrescriptionPanel } from '@/components/bench/prescription-panel';
import { nextBand } from '@/components/bench/prescription/presaturation-group';
import type { LiveAssessor } from '@/components/bench/live/live-assessor';
import { startBench } from '@/components/bench/state/bench-state';
import { createBenchStore } from '@/components/bench/state/bench-store';
import { tidyPrescription } from '@/components/bench/state/prescription-edit';
import { keepClearShape } from '@/lib/schemas/case/keep-clear';
import { accelerationShape, FAMILIES, presaturationShape, prescriptionShape, slabShape, stackShape } from '@/lib/schemas/case/prescription';
import { DEFAULT_POLICY } from '@/lib/physics/model/default-policy';
import type { Prescription } from '@/lib/physics/model/prescription';
import { benchDocument } from '@/tests/support/bench-documents';

/** A stored value with a control that speaks in the scanner's terms, or that follows from another by the schema's rules. */
const SPOKEN_OTHERWISE: Readonly<Record<string, string>> = {
  acquiredLines: 'phaseOversampling',
  'slices.acquiredPartitions': 'sliceOversampling',
  'slices.mode': 'family',
};

const live: LiveAssessor = { read: () => ({}), subscribe: () => () => {}, start: () => () => {} };

/** The panels read the store only; what works away from them stays out. */
function benchOf(prescription: Prescription): BenchContextValue {
  const document = benchDocument({ sequences: [{ id: 'a', prescription, adopted: [] }] });
  return { store: createBenchStore(startBench(document, 'a', null)), live, setting: { policy: DEFAULT_POLICY, today: '2026-03-02' } } as BenchContextValue;
}

function fieldsOf(bench: BenchContextValue, panel: ReactNode): Set<string> {
  const markup = renderToStaticMarkup(createElement(BenchProvider, { value: bench }, panel));
  return new Set([...markup.matchAll(/ (?:name|data-field)="([^"]+)"/g)].map(([, name]) => name!));
}

/** What the panel shows over every family, with a band, everything optional known, and one breathing of each kind. */
function prescriptionFields(): Set<string> {
  const { scanner, sequences } = benchDocument();
  const base = sequences[0]!.prescription;
  const all = FAMILIES.flatMap((family) => (['free', 'triggered'] as const).map((breathing): Prescription => {
    const changed = tidyPrescription(base, { family, breathing }, scanner);
    const { slices } = changed;
    return {
      ...changed,
      presaturation: [nextBand(changed)],
      acceleration: { ...changed.acceleration, factorPhase: 2, geometryFactor: 1.2 },
      slices: slices.mode === 'slab' ? { ...slices, timeBandwidthProduct: 4, pulseDurationMs: 2, fatShiftTowards: 'low-end' } : slices,
    };
  }));
  const names = all.flatMap((prescription) => [...fieldsOf(benchOf(prescription), createElement(PrescriptionPanel, { source: 'Protocol', protocol: {} }))]);
  return new Set(names);
}

const under = (path: string, shape: Readonly<Record<string, z.ZodType>>) => Object.keys(shape).map((key) => `${path}.${key}`);

describe('every field of the engine’s input has a control on the bench', () => {
  const shown = prescriptionFields();
  const { slices: _slices, acceleration: _acceleration, presaturation: _presaturation, centreMm: _centre, ...plain } = prescriptionShape;
  const keys = [
    ...Object.keys(plain),
    'centreMm.0', 'centreMm.1', 'centreMm.2',
    ...under('acceleration', accelerationShape),
    ...under('slices', stackShape),
    ...under('slices', slabShape),
    ...under('presaturation.0', presaturationShape),
  ];

  it.each([...new Set(keys)])('%s', (key) => {
    expect([...shown]).toContain(SPOKEN_OTHERWISE[key] ?? key);
  });

  it('says "not known" for what a protocol leaves out, and asks for no figure then', () => {
    const { scanner, sequences } = benchDocument();
    const slab = tidyPrescription(sequences[0]!.prescription, { family: 'gradient-echo-3d' }, scanner);
    const names = fieldsOf(benchOf(slab), createElement(PrescriptionPanel, { source: 'Protocol', protocol: {} }));
    for (const path of ['slices.timeBandwidthProduct', 'slices.pulseDurationMs', 'acceleration.geometryFactor']) {
      expect(names.has(`${path}.known`), path).toBe(true);
      expect(names.has(path), path).toBe(false);
    }
  });

  it('the keep-clear area and what must stay displayed are typed by their six edges', () => {
    const document = benchDocument();
    const { area } = document.keepClear;
    if (area.kind !== 'box') throw new Error('The bench document of the tests has a box.');
    const keepClear = { ...document.keepClear, mustStayDisplayed: area.box };
    const store = createBenchStore(startBench({ ...document, keepClear }, 'a', null));
    const names = fieldsOf({ ...benchOf(document.sequences[0]!.prescription), store }, createElement(KeepClearPanel, { preset: document.keepClear }));
    for (const side of ['right', 'left', 'anterior', 'posterior', 'superior', 'inferior']) {
      expect(names.has(`keep-clear.${side}`), side).toBe(true);
      expect(names.has(`must-stay.${side}`), side).toBe(true);
    }
    expect(Object.keys(keepClearShape).sort()).toEqual(['area', 'followsWindow', 'mustStayDisplayed']);
  });
});
