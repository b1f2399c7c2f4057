import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { boundsOf, centroidOf, hatch } from '@/components/schematic/scene/rings';
import { fitScene, fromPixels, toPixels, type AreaNode, type LinesNode, type Ring, type TextNode } from '@/components/schematic/scene/scene';
import { screenFrame, toPatient, toScreen } from '@/components/schematic/scene/section-frame';
import { sectionBounds, sectionScene, type DrawnSection } from '@/components/schematic/scene/section-scene';
import { geometryCase } from '@/lib/physics/assess/assess';
import type { Case } from '@/lib/physics/model/case';
import { DEFAULT_POLICY } from '@/lib/physics/model/default-policy';
import type { Prescription } from '@/lib/physics/model/prescription';
import { drawSection } from '@/lib/physics/section/draw-section';
import { benchDocument } from '@/tests/support/bench-documents';
import { accelerated, typicalPrescription } from '@/tests/support/physics-cases';

/** Body 480 × 340 mm, FOV 300 A–P, keep-clear from 140 mm anterior: W is 300, so the back lands 300 mm further forward. */
function draw(overrides: Partial<Prescription> = {}): DrawnSection {
  const { patient, keepClear, scanner } = benchDocument();
  const question: Case = { patient, keepClear, scanner, policy: DEFAULT_POLICY, prescription: typicalPrescription(overrides) };
  return { question, drawing: drawSection(geometryCase(question)), asGiven: drawSection(question).tissue };
}

const MM_PER_PX = 0.8;
function sceneOf(drawn: DrawnSection, extra: { tried?: DrawnSection; focus?: string } = {}) {
  return sectionScene({ ...drawn, ...extra, bounds: sectionBounds(drawn, extra.tried), mmPerPx: MM_PER_PX });
}
const named = (scene: ReturnType<typeof sceneOf>, name: RegExp | string) =>
  scene.nodes.filter((node) => (typeof name === 'string' ? node.name === name : name.test(node.name)));

describe('the section as a scene', () => {
  const scene = sceneOf(draw());

  it('shows the patient’s left on the right of an axial picture, anterior on top', () => {
    const letter = (side: string) => named(scene, `letter/${side}`)[0] as TextNode;
    expect(['left', 'right', 'top', 'bottom'].map((side) => letter(side).text)).toEqual(['R', 'L', 'A', 'P']);
    expect(letter('right').at[0]).toBeGreaterThan(letter('left').at[0]);
    expect(letter('top').at[1]).toBeLessThan(letter('bottom').at[1]);
  });

  it('draws every outlying piece where it is and where it lands: the same outline moved by the acquired width', () => {
    const landed = named(scene, /^piece\/.*\/landed$/) as AreaNode[];
    expect(landed.length).toBeGreaterThanOrEqual(2);
    for (const piece of landed) {
      const source = named(scene, piece.name.replace('/landed', '/source'))[0] as AreaNode;
      const from = boundsOf(source.rings)!;
      const to = boundsOf(piece.rings)!;
      expect(Math.hypot(...piece.slideFrom!)).toBeCloseTo(300, 6);
      // The landed outline is cropped to the window, so it lies inside the moved source.
      expect(to.top + piece.slideFrom![1]).toBeGreaterThanOrEqual(from.top - 1e-6);
      expect(to.bottom + piece.slideFrom![1]).toBeLessThanOrEqual(from.bottom + 1e-6);
    }
  });

  it('keeps red for what reaches the keep-clear area, and ties it to its source with a straight thread along phase', () => {
    const red = scene.nodes.filter((node) => 'stroke' in node && node.stroke?.colour === 'thread').map(({ name }) => name);
    expect(red.length).toBeGreaterThan(0);
    expect(red.every((name) => /\/in-keep-clear(\/hatch)?$/.test(name) || name === 'thread')).toBe(true);
    const [[origin, target]] = (named(scene, 'thread')[0] as LinesNode).lines as [[readonly [number, number], readonly [number, number]]];
    expect(origin[0]).toBeCloseTo(target[0], 9);
    expect(Math.abs(origin[1] - target[1])).toBeCloseTo(300, 6);
    expect((named(scene, 'thread/label')[0] as TextNode).text).toBe('from the posterior side, 300 mm away');
  });

  it('leaves no red once enough is acquired', () => {
    const enough = sceneOf(draw({ acquiredLines: 256 }));
    expect(enough.nodes.some((node) => 'stroke' in node && node.stroke?.colour === 'thread')).toBe(false);
  });

  it('shows now and tried: both acquired edges, labelled, and what lands then', () => {
    const trial = sceneOf(draw(), { tried: draw({ acquiredLines: 256 }) });
    expect((named(trial, 'tried-edge/label')[0] as TextNode).text).toBe('tried 320 mm');
    expect((named(trial, 'acquired-edge/label')[0] as TextNode).text).toBe('now 300 mm');
    expect(named(trial, 'tried-fov')).toHaveLength(0);
    expect(named(sceneOf(draw(), { tried: draw({ fovPhaseMm: 320 }) }), 'tried-fov')).toHaveLength(1);
  });

  it('keeps the words of both widths off the body where there is no room beside the window', () => {
    const [now, tried] = [draw(), draw({ acquiredLines: 256 })];
    const bounds = sectionBounds(now, tried);
    // A phone: a pixel for 2 mm.
    const narrow = sectionScene({ ...now, tried, bounds, mmPerPx: 2 });
    const labels = ['tried-edge/label', 'acquired-edge/label'].map((name) => named(narrow, name)[0] as TextNode);
    for (const label of labels) expect(label).toMatchObject({ at: [bounds.right, bounds.top], anchor: 'end' });
    expect(labels[1]!.offsetPx[1] - labels[0]!.offsetPx[1]).toBeGreaterThanOrEqual(16);
  });

  it('hatches of a ghost only what has a certain place, and outlines the rest dashed and in words', () => {
    const { question, drawing, asGiven } = draw({ acceleration: accelerated(2, { unfolding: 'image-domain-grid-ends' }) });
    const whole = drawing.ghosts.find(({ landed }) => landed.length > 0)!;
    const none = { source: [], landed: [], inKeepClear: [] };
    const rest = { source: whole.source, landed: whole.landed, inKeepClear: whole.inKeepClear };
    const sceneWith = (byPlace: NonNullable<typeof whole.byPlace>) =>
      sceneOf({ question, drawing: { ...drawing, pieces: [], ghosts: [{ ...whole, placeUncertain: true, byPlace }] }, asGiven });
    const unsure = sceneWith({ certain: none, uncertain: rest });
    expect(named(unsure, `${whole.name}/hatch`)).toHaveLength(0);
    expect(named(unsure, `${whole.name}/landed/uncertain`)[0]).toMatchObject({ stroke: { edge: 'dashed' } });
    expect(named(unsure, `${whole.name}/landed/uncertain/label`)[0]).toMatchObject({ text: 'place uncertain' });
    const sure = sceneWith({ certain: rest, uncertain: none });
    expect(named(sure, `${whole.name}/hatch`)).toHaveLength(1);
    expect(named(sure, `${whole.name}/landed/uncertain`)).toHaveLength(0);
    expect(named(sure, whole.name)[0]).not.toMatchObject({ stroke: { edge: 'dashed' } });
  });

  it('draws ghosts of an accelerated scan whose unfolding ends at the acquired width', () => {
    const ghosts = sceneOf(draw({ acceleration: accelerated(2, { unfolding: 'image-domain-grid-ends' }) }));
    expect(named(ghosts, /^ghost\/.*\/in-keep-clear$/).length).toBeGreaterThan(0);
    expect((named(ghosts, 'thread/label')[0] as TextNode).text).toMatch(/^ghost of tissue from the \w+ side/);
  });

  it('gives every node a name of its own', () => {
    const names = scene.nodes.map(({ name }) => name);
    expect(new Set(names).size).toBe(names.length);
  });
});

describe('geometry of the picture', () => {
  it('goes from the patient to the screen and back, tilted or not', () => {
    const tilt = fc.integer({ min: -30, max: 30 });
    const length = fc.integer({ min: -300, max: 300 });
    fc.assert(
      fc.property(fc.constantFrom('axial', 'coronal', 'sagittal'), tilt, tilt, length, length, (plane, a, b, u, v) => {
        const phaseAxis = plane === 'axial' ? 'AP' : 'SI';
        const frame = screenFrame(typicalPrescription({ plane, phaseAxis, tiltAboutReadoutDeg: a, tiltAboutPhaseDeg: b }));
        const back = toScreen(frame, toPatient(frame, [u, v], 17));
        // Three multiplications and sums of numbers below 1000: 1e-9 is a million times their rounding.
        expect(back[0]).toBeCloseTo(u, 9);
        expect(back[1]).toBeCloseTo(v, 9);
      }),
      { seed: 20260304, numRuns: 300 },
    );
  });

  it('fits a scene into a box and finds millimetres again from pixels', () => {
    const fit = fitScene({ left: -300, right: 300, top: -200, bottom: 200 }, 900, 400);
    expect(fit.scale).toBe(1);
    expect(toPixels(fit, [0, 0])).toEqual([450, 200]);
    expect(fromPixels(fit, toPixels(fit, [12, -34]))).toEqual([12, -34]);
  });

  it('hatches only inside the outline, holes left out, with strokes of the asked spacing', () => {
    const outer: Ring = [[0, 0], [100, 0], [100, 100], [0, 100]];
    const hole: Ring = [[40, 40], [60, 40], [60, 60], [40, 60]];
    const strokes = hatch([outer, hole], 0, 10);
    expect(strokes).toHaveLength(12); // 10 levels; two of them, 40 and 50, are parted by the hole.
    const length = strokes.reduce((sum, [a, b]) => sum + Math.hypot(b[0] - a[0], b[1] - a[1]), 0);
    expect(length).toBeCloseTo(10 * 100 - 2 * 20, 9);
    const slanted = hatch([outer], 45, 5);
    expect(slanted.flat().every(([u, v]) => u > -1e-9 && u < 100 + 1e-9 && v > -1e-9 && v < 100 + 1e-9)).toBe(true);
  });

  it('takes the centroid of the largest ring', () => {
    expect(centroidOf([[[0, 0], [2, 0], [2, 2], [0, 2]], [[10, 10], [11, 10], [11, 11], [10, 11]]])).toEqual([1, 1]);
    expect(centroidOf([])).toBeNull();
  });
});

describe('what is not known for certain', () => {
  const wide = (): DrawnSection => {
    const { patient, keepClear, scanner } = benchDocument();
    const question: Case = {
      patient,
      keepClear,
      scanner: { ...scanner, limits: { ...scanner.limits, usableFovMm: [440, 500, 400] } },
      policy: DEFAULT_POLICY,
      prescription: typicalPrescription({ phaseAxis: 'RL', fovPhaseMm: 400, fovReadoutMm: 340 }),
    };
    return { question, drawing: drawSection(geometryCase(question)) };
  };

  it('hatches what lands for certain, and gives what comes from beyond the usable FOV a dashed outline and words', () => {
    const scene = sceneOf(wide());
    const hatched = named(scene, /^piece\/trunk\/-?1\/landed\/hatch$/);
    expect(hatched).toHaveLength(2);
    for (const name of ['piece/trunk/1', 'piece/trunk/-1']) {
      const uncertain = named(scene, `${name}/landed/uncertain`)[0] as AreaNode;
      expect(uncertain.stroke!.edge).toBe('dashed');
      expect(uncertain.fill).toBeUndefined();
      expect((named(scene, `${name}/landed/uncertain/label`)[0] as TextNode).text).toBe('place uncertain');
      expect((named(scene, `${name}/landed`)[0] as AreaNode).stroke!.edge).not.toBe('dashed');
    }
    expect((named(scene, 'tissue/trunk/beyond-usable')[0] as AreaNode).stroke!.edge).toBe('dashed');
    expect((named(scene, 'tissue/trunk/within-usable')[0] as AreaNode).stroke!.edge).not.toBe('dashed');
  });

  it('shows the band between the size as given and the size counted on', () => {
    const { patient, keepClear, scanner } = benchDocument();
    const spread = { ...patient.extents.anterior, spread: 12 };
    const question: Case = {
      patient: { ...patient, extents: { ...patient.extents, anterior: spread } },
      keepClear,
      scanner,
      policy: DEFAULT_POLICY,
      prescription: typicalPrescription(),
    };
    const at = (sureAt: number) => {
      const asked = { ...question, policy: { ...DEFAULT_POLICY, sureAt } };
      return sceneOf({ question: asked, drawing: drawSection(geometryCase(asked)), asGiven: drawSection(asked).tissue });
    };
    expect((named(at(0.95), 'tissue/trunk')[0] as AreaNode).stroke!.edge).toBe('dotted');
    expect((named(at(0.95), 'tissue/trunk/as-given')[0] as AreaNode).stroke!.edge).toBe('solid');
    const reach = (sureAt: number) => boundsOf((named(at(sureAt), 'tissue/trunk/band')[0] as AreaNode).rings)!.top;
    // 1.645 and 3.090 spreads of 12 mm (normal quantiles), the outline sampled within 0.3 mm.
    expect(Math.abs(reach(0.95) + patient.extents.anterior.value + 1.645 * 12)).toBeLessThan(0.5);
    expect(Math.abs(reach(0.999) + patient.extents.anterior.value + 3.09 * 12)).toBeLessThan(0.5);
    expect(named(at(0.5), 'tissue/trunk/band')).toHaveLength(0);
    expect((named(at(0.5), 'tissue/trunk')[0] as AreaNode).stroke!.edge).toBe('solid');
  });
});
