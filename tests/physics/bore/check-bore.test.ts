import { describe, expect, it } from 'vitest';
import { sectionClearance } from '@/lib/physics/bore/bore-clearance';
import { checkBore } from '@/lib/physics/bore/check-bore';
import { hipBreadthFromBmi } from '@/lib/physics/size/estimate-hips';
import { shouldersFromWeightAndHeight } from '@/lib/physics/size/estimate-shoulders';
import { extentsOf, measured, typicalPatient, typicalScanner } from '@/tests/support/physics-cases';

const scanner = typicalScanner({ boreDiameterMm: 700 });
const feetFirst = typicalPatient({ position: 'feet-first-supine', sex: 'male' });

describe('a patient in a scanner’s opening', () => {
  it('takes breadth and depth from the size record, with both sides’ spread, and the coil on the trunk', () => {
    const patient = {
      ...feetFirst,
      extents: { ...extentsOf({}), left: measured(250, 6), right: measured(230, 4) },
    };
    const { sections } = checkBore(patient, scanner);
    const trunk = sections.find(({ section }) => section === 'trunk')!;
    const expected = sectionClearance(
      {
        name: 'trunk',
        zFromTargetMm: 0,
        parts: [
          {
            name: 'trunk',
            breadthMm: measured(480, 10),
            depthMm: measured(340),
            centreMm: 0,
            raisedMm: 0,
            underCoil: true,
          },
        ],
      },
      { bore: { diameterMm: 700, tableBelowCentreMm: 170 }, coilMm: 40, padMm: 0, lateralOffsetMm: 0 },
    );
    expect(trunk).toEqual(expected);
  });
  it('estimates hips and, head-first, shoulders from weight and height; says what it cannot know', () => {
    const answer = checkBore({ ...feetFirst, position: 'head-first-supine' }, scanner);
    expect(answer.sections.map(({ section }) => section)).toEqual(['trunk', 'hips', 'shoulders']);
    expect(answer.unknown).toEqual(['breadth over the elbows']);
    const withoutWeight = checkBore(
      { ...feetFirst, position: 'head-first-supine', weightKg: undefined },
      scanner,
    );
    expect(withoutWeight.sections.map(({ section }) => section)).toEqual(['trunk']);
    expect(withoutWeight.unknown).toEqual(['hip breadth', 'shoulder breadth', 'breadth over the elbows']);
  });
  it('a given size replaces the estimate', () => {
    const hips = (hipBreadthMm?: number) =>
      checkBore(
        feetFirst,
        scanner,
        hipBreadthMm ? { hipBreadthMm: measured(hipBreadthMm) } : {},
      ).sections.find(({ section }) => section === 'hips')!;
    const estimated = hipBreadthFromBmi(140 / 1.72 ** 2, 'male').value;
    expect(hips(estimated).clearanceMm).toBeCloseTo(hips().clearanceMm, 9);
    expect(hips(650).clearanceMm).toBeLessThan(hips().clearanceMm);
  });
  it('the coil lies on the hips for a pelvis, and on nothing for a knee', () => {
    const clearance = (region: 'abdomen' | 'pelvis' | 'knee', section: 'trunk' | 'hips') =>
      checkBore({ ...feetFirst, region }, typicalScanner({ boreDiameterMm: 600 })).sections.find(
        (one) => one.section === section,
      )!.clearanceMm;
    expect(clearance('abdomen', 'trunk')).toBeLessThan(clearance('knee', 'trunk'));
    expect(clearance('pelvis', 'hips')).toBeLessThan(clearance('knee', 'hips'));
    expect(clearance('pelvis', 'trunk')).toBe(clearance('knee', 'trunk'));
  });
  it('a pad, an offset and a narrower bore all take room; the chord at the table is the scanner’s', () => {
    const tight = (...args: Parameters<typeof checkBore>) => checkBore(...args).tightest!.clearanceMm;
    const base = tight(feetFirst, scanner);
    expect(tight({ ...feetFirst, lateralOffsetMm: 25 }, scanner)).toBeLessThan(base);
    expect(tight(feetFirst, typicalScanner({ boreDiameterMm: 600 }))).toBeCloseTo(base - 50, 6);
    // A pad lifts the patient towards the middle, where the bore is widest, until the front becomes the tight place.
    expect(tight(feetFirst, scanner, { padMm: 120 })).toBeLessThan(base);
    expect(checkBore(feetFirst, scanner).chordAtTableMm).toBeCloseTo(612, 0);
  });
  it('sections beyond the narrow part are outside', () => {
    const answer = checkBore(feetFirst, scanner, { hipsZMm: -900, halfLengthMm: 800 });
    expect(answer.sections.map(({ section }) => section)).toEqual(['trunk']);
    expect(answer.outside.map(({ name }) => name)).toEqual(['hips']);
    // One at its very end is in it, on either side; what is nearer is too.
    for (const hipsZMm of [-800, 800, -799])
      expect(checkBore(feetFirst, scanner, { hipsZMm, halfLengthMm: 800 }).outside).toEqual([]);
    for (const hipsZMm of [-800.1, 800.1])
      expect(
        checkBore(feetFirst, scanner, { hipsZMm, halfLengthMm: 800 }).outside.map(({ name }) => name),
      ).toEqual(['hips']);
  });
});

describe('sections whose place along the body is not known', () => {
  it('count in however short a bore: they are taken to lie at the target', () => {
    const patient = { ...feetFirst, position: 'head-first-supine' as const };
    const { sections, outside } = checkBore(patient, scanner, {
      halfLengthMm: 0,
      elbowBreadthMm: measured(480),
    });
    expect(sections.map(({ section }) => section)).toEqual(['trunk', 'hips', 'shoulders', 'elbows']);
    expect(outside).toEqual([]);
    const down = { ...patient, arms: { ...patient.arms, position: 'down' as const } };
    expect(checkBore(down, scanner, { halfLengthMm: 0 }).sections.map(({ section }) => section)).toEqual([
      'trunk',
      'arms',
      'hips',
      'shoulders',
    ]);
  });
});

describe('shoulders from weight and height (girth and depth: Heinz 2003; the ratio: our model)', () => {
  const at = (weight: number, height: number, sex?: 'male' | 'female') =>
    shouldersFromWeightAndHeight(measured(weight), measured(height), sex);
  it('gives adults about the breadth that surveys of bideltoid breadth find (men 51 cm, women 45 cm; ANSUR II, from memory)', () => {
    // ± 1 cm: one ratio serves both sexes.
    expect(Math.abs(at(85, 176, 'male').breadth.value - 510)).toBeLessThan(10);
    expect(Math.abs(at(68, 163, 'female').breadth.value - 450)).toBeLessThan(10);
  });
  it('grows with weight, carries its errors, mixes an unknown sex and says when it extrapolates', () => {
    expect(at(110, 176, 'male').breadth.value).toBeGreaterThan(at(85, 176, 'male').breadth.value);
    expect(at(85, 176, 'male').breadth.extrapolated).toBe(false);
    expect(at(140, 172, 'male').breadth).toMatchObject({ extrapolated: true, source: 'weight-and-height' });
    const [man, woman, either] = [at(85, 172, 'male'), at(85, 172, 'female'), at(85, 172)];
    expect(either!.breadth.value).toBeCloseTo((man!.breadth.value + woman!.breadth.value) / 2, 9);
    expect(
      shouldersFromWeightAndHeight(measured(85, 6), measured(176), 'male').breadth.spread,
    ).toBeGreaterThan(at(85, 176, 'male').breadth.spread);
    expect(at(85, 176, 'male').depth.value).toBeGreaterThan(200);
  });
});
