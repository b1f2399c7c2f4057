import { describe, expect, it } from 'vitest';
import type { BodyRegion, ReadingSource } from '@/lib/domain/case/model';
import { composePatient } from '@/lib/domain/size-reading/compose-patient';
import type { SizeQuantity } from '@/lib/domain/size-reading/quantities';
import type { SizeReading } from '@/lib/domain/size-reading/size-reading';

const NOW = new Date('2026-05-04T09:00:00Z');
let count = 0;
function read(quantity: SizeQuantity, value: number, more: Partial<SizeReading> & { source?: ReadingSource } = {}): SizeReading {
  count += 1;
  return {
    id: String(count), quantity, value, source: 'measured', spread: 4, takenOn: '2026-05-01',
    recordedAt: new Date(NOW.getTime() - 1_000_000 + count), ...more,
  };
}
const compose = (readings: SizeReading[], region: BodyRegion = 'abdomen') =>
  composePatient({ readings, region, tissueReachMm: 250, policy: { readingExpiryDays: 60 }, now: NOW });

describe('the patient of a size record', () => {
  it('takes breadth and depth as centred, each side with half of their one error', () => {
    const { patient, missing } = compose([read('breadth-mm', 480), read('depth-mm', 340, { source: 'localiser', spread: 2 })]);
    expect(missing).toEqual([]);
    expect(patient!.extents.left).toEqual({ value: 240, spread: 2, source: 'measured', takenOn: '2026-05-01' });
    expect(patient!.extents.posterior).toMatchObject({ value: 170, spread: 1, source: 'localiser' });
    expect(patient!.extents.superior).toEqual({ value: 250, spread: 0, source: 'policy-default' });
  });

  it('lets a corrected reading count and the older one stay', () => {
    const { patient } = compose([read('breadth-mm', 480), read('depth-mm', 340), read('breadth-mm', 466)]);
    expect(patient!.extents.right.value).toBe(233);
  });

  it('uses the newer of two ways and says that they do not agree', () => {
    const { patient, remarks } = compose([
      read('breadth-mm', 480), read('depth-mm', 340), read('extent-right-mm', 200), read('extent-left-mm', 216),
    ]);
    expect(patient!.extents.left.value).toBe(216);
    expect(remarks[0]).toBe('Two readings do not agree: 416 mm from right and left, 480 mm from breadth. The newer one is used.');
  });

  it('works sizes out from girth, with their spread and the words that say how', () => {
    const { patient, remarks } = compose([read('girth-cm', 131, { spread: 2 }), read('sex', 1)]);
    // −2.88 + 0.257 · 131 = 30.8 cm deep, 2.26 + 0.341 · 131 = 46.9 cm broad (CDC/NCHS NHANES 2013–16, women).
    expect(patient!.extents.anterior).toMatchObject({ value: 154, source: 'girth' });
    expect(patient!.extents.right).toMatchObject({ value: 234.5, source: 'girth' });
    expect(patient!.extents.anterior.spread).toBeGreaterThan(7);
    expect(remarks.join(' ')).toContain('girth');
  });

  it('takes the hips as the widest part of a pelvis', () => {
    const readings = [read('girth-cm', 110), read('hip-girth-cm', 142), read('sex', 1)];
    expect(compose(readings, 'pelvis').patient!.extents.left.value).toBeGreaterThan(compose(readings).patient!.extents.left.value);
  });

  it('asks for a size below BMI 35, where weight and height tell none', () => {
    const { patient, missing, remarks } = compose([read('weight-kg', 80), read('height-cm', 180), read('sex', 2)]);
    expect(patient).toBeUndefined();
    expect(missing).toHaveLength(2);
    expect(remarks.join(' ')).toContain('Size needed');
  });

  it('says which readings are too old, and that sex and height do not wear off', () => {
    const { remarks } = compose([
      read('breadth-mm', 480, { takenOn: '2026-02-01' }), read('depth-mm', 340), read('sex', 1, { takenOn: '2020-01-01' }), read('weight-kg', 140),
    ]);
    expect(remarks).toEqual(['Older than 60 days: breadth, right–left.']);
  });

  it('a value no person has gives a sentence, not a failure', () => {
    expect(compose([read('girth-cm', 31)]).remarks.join(' ')).toContain('No size can be worked out');
  });
});
