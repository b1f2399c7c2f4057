import { describe, expect, it } from 'vitest';
import { boundsOf } from '@/components/schematic/scene/rings';
import { sectionBounds, sectionScene } from '@/components/schematic/scene/section-scene';
import type { AreaNode } from '@/components/schematic/scene/scene';
import { geometryCase } from '@/lib/physics/assess/assess';
import { DEFAULT_POLICY } from '@/lib/physics/model/default-policy';
import type { BodyRegion } from '@/lib/physics/model/patient';
import type { Plane } from '@/lib/physics/model/prescription';
import { drawSection } from '@/lib/physics/section/draw-section';
import { benchDocument } from '@/tests/support/bench-documents';
import { typicalPrescription } from '@/tests/support/physics-cases';

const REGIONS: readonly BodyRegion[] = ['abdomen', 'pelvis', 'chest', 'head', 'shoulder', 'hip', 'knee', 'breast'];
const PLANES: readonly Plane[] = ['axial', 'coronal', 'sagittal'];

function areasOf(region: BodyRegion, plane: Plane): AreaNode[] {
  const { patient, keepClear, scanner } = benchDocument();
  const phaseAxis = plane === 'axial' ? 'AP' : 'SI';
  const question = {
    patient: { ...patient, region },
    keepClear,
    scanner,
    policy: DEFAULT_POLICY,
    prescription: typicalPrescription({ plane, phaseAxis }),
  };
  const drawn = { question, drawing: drawSection(geometryCase(question)) };
  const { nodes } = sectionScene({ ...drawn, bounds: sectionBounds(drawn), mmPerPx: 1 });
  return nodes.filter((node): node is AreaNode => node.kind === 'area');
}

describe.each(REGIONS.flatMap((region) => PLANES.map((plane) => [region, plane] as const)))('%s, %s', (region, plane) => {
  const areas = areasOf(region, plane);
  const sketch = areas.filter(({ name }) => name.startsWith('sketch/'));

  it('is drawn with something to find one’s way by', () => {
    expect(sketch.length).toBeGreaterThanOrEqual(2);
    expect(new Set(sketch.map(({ name }) => name)).size).toBe(sketch.length);
  });

  it('keeps every organ inside the part it lies in', () => {
    for (const organ of sketch) {
      const host = areas.find(({ name }) => organ.name.startsWith(`sketch/${name.replace(/^tissue\//, '')}/`))!;
      const [inner, outer] = [boundsOf(organ.rings)!, boundsOf(host.rings)!];
      expect(inner.left, organ.name).toBeGreaterThanOrEqual(outer.left);
      expect(inner.right, organ.name).toBeLessThanOrEqual(outer.right);
      expect(inner.top, organ.name).toBeGreaterThanOrEqual(outer.top);
      expect(inner.bottom, organ.name).toBeLessThanOrEqual(outer.bottom);
    }
  });
});
