import { describe, expect, it } from 'vitest';
import { boreBounds, boreScene } from '@/components/schematic/scene/bore-scene';
import type { AreaNode, LinesNode, TextNode } from '@/components/schematic/scene/scene';
import { checkBore } from '@/lib/physics/bore/check-bore';
import type { Patient } from '@/lib/physics/model/patient';
import { describeBasis, describeClearance, describeSections, sureClearanceMm, tightestAt, WHO_DECIDES } from '@/lib/presentation/describe-bore';
import { extentsOf, measured, typicalPatient, typicalScanner } from '@/tests/support/physics-cases';

const patientOf = (right: number, overrides: Partial<Patient> = {}) =>
  typicalPatient({ extents: extentsOf({ right, left: right, anterior: 200, posterior: 200 }), position: 'feet-first-supine', ...overrides });

function sceneOf(patient: Patient, padMm = 0, scanner = typicalScanner({ boreDiameterMm: 600, tableBelowCentreMm: 170, anteriorCoilMm: 0 })) {
  const check = checkBore(patient, scanner, { padMm });
  const { nodes } = boreScene({ check, scanner, patient, padMm, bounds: boreBounds(scanner), mmPerPx: 1 });
  const named = <Node>(name: string) => nodes.find((node) => node.name === name) as Node | undefined;
  return { check, nodes, named };
}

describe('the opening as a scene', () => {
  it('draws the clearance from the tightest point of the body straight out to the opening', () => {
    const { check, named } = sceneOf(patientOf(200));
    const [[body, wall]] = named<LinesNode>('clearance')!.lines as [[readonly [number, number], readonly [number, number]]];
    expect(Math.hypot(...wall)).toBeCloseTo(300, 9);
    expect(Math.hypot(wall[0] - body[0], wall[1] - body[1])).toBeCloseTo(check.tightest!.clearanceMm, 6);
    expect(named<TextNode>('clearance/label')!.text).toMatch(new RegExp(`^[\\d.]+ mm, at the ${check.tightest!.section}$`));
    const outline = named<AreaNode>(`section/${check.tightest!.section}/${check.tightest!.part}`)!.rings[0]!;
    const farthest = Math.max(...outline.map(([u, v]) => Math.hypot(u, v)));
    // The outline has 120 points, 5 mm apart or less where it bends.
    expect(Math.abs(300 - farthest - check.tightest!.clearanceMm)).toBeLessThan(0.5);
  });

  it('says that the opening is too small, never that somebody is too large', () => {
    const { check, named, nodes } = sceneOf(patientOf(320));
    expect(check.tightest!.clearanceMm).toBeLessThan(0);
    expect(named<TextNode>('clearance/label')!.text).toContain('mm too small');
    expect(named<LinesNode>('clearance')!.stroke.edge).toBe('dashed');
    const words = [...describeClearance(check, 0.95), ...describeSections(check), ...describeBasis(check), WHO_DECIDES, ...nodes.flatMap((node) => ('text' in node ? [node.text] : []))].join(' ');
    expect(words).toContain('this scanner’s opening is too small');
    expect(words).toContain('Planning estimate');
    expect(words).toContain('Trained staff decide');
    expect(words).not.toMatch(/patient (is )?too|will fit|\bsafe\b/i);
    expect(nodes.some((node) => 'stroke' in node && node.stroke?.colour === 'thread')).toBe(false);
  });

  it('puts the patient’s left on the right, and moves the body with its offset and up with a pad', () => {
    const middle = ({ rings }: AreaNode) => {
      const at = rings[0]!.map((point) => point);
      return [0, 1].map((i) => (Math.min(...at.map((p) => p[i]!)) + Math.max(...at.map((p) => p[i]!))) / 2);
    };
    const trunk = (patient: Patient, padMm = 0) => middle(sceneOf(patient, padMm).named<AreaNode>('section/trunk/trunk')!);
    const [u, v] = trunk(patientOf(200));
    const [toLeft] = trunk(patientOf(200, { lateralOffsetMm: 30 }));
    const [, raised] = trunk(patientOf(200), 12);
    expect(toLeft! - u!).toBeCloseTo(30, 6);
    expect(v! - raised!).toBeCloseTo(12, 6);
    expect(sceneOf(patientOf(200), 12).named('pad')).toBeDefined();
    expect(sceneOf(patientOf(200)).named('pad')).toBeUndefined();
    const scene = sceneOf(patientOf(200));
    expect(scene.named<TextNode>('letter/left')!.at[0]).toBeGreaterThan(scene.named<TextNode>('letter/right')!.at[0]);
    expect(sceneOf(patientOf(200, { position: 'feet-first-prone' })).named<TextNode>('letter/posterior')!.at[1]).toBeLessThan(0);
  });

  it('lays the coil on what it lies on and on nothing else, and dots what was not measured', () => {
    const scanner = typicalScanner({ boreDiameterMm: 700, tableBelowCentreMm: 170, anteriorCoilMm: 40 });
    const estimated = { ...measured(220, 15), source: 'girth' as const };
    const patient = patientOf(200, { extents: { ...extentsOf({ right: 200, left: 200, anterior: 200, posterior: 200 }), right: estimated, left: estimated } });
    const { named, nodes, check } = sceneOf(patient, 0, scanner);
    expect(nodes.filter(({ name }) => /^coil\/[a-z]+$/.test(name)).map(({ name }) => name)).toEqual(['coil/trunk']);
    expect(named<AreaNode>('section/trunk/trunk')!.stroke!.edge).toBe('dotted');
    const sure = tightestAt(check, 0.95)!;
    expect(sureClearanceMm(sure, 0.95)).toBeLessThan(sure.clearanceMm);
    expect(sureClearanceMm(sure, 0.5)).toBeCloseTo(sure.clearanceMm, 9);
    expect(describeClearance(check, 0.95)[1]).toContain('95 %');
    expect(describeClearance(check, 0.5)).toHaveLength(1);
  });
});
