import { describe, expect, it } from 'vitest';
import { DEMO_PROTOCOLS } from '@/db/seed/demo-protocols';
import { DEMO_SCANNERS } from '@/db/seed/demo-scanners';
import type { CheckedScanner } from '@/lib/domain/pre-check/check-on-scanner';
import { preCheck } from '@/lib/domain/pre-check/pre-check';
import { PRE_CHECK_RESULTS, type PreCheck } from '@/lib/domain/pre-check/result';
import type { SizeReading } from '@/lib/domain/size-reading/size-reading';
import { drawnAdults, type DrawnAdult } from '@/tests/support/drawn-adults';
import { preCheckQuestion, reading, readingsOf } from '@/tests/support/pre-check-questions';
import { countOf, NO_HURRY_MS, progress, tally } from '@/tests/support/tally';

/** Adults in `npm test`; test:long sets 1,000. */
const ADULTS = countOf('SELVEDGE_POPULATION', 16);

const scannerOf = (key: 'A' | 'B'): CheckedScanner => ({
  id: key, version: 1, archivedAt: null, document: DEMO_SCANNERS[key],
});
const SCANNERS = { A: scannerOf('A'), B: scannerOf('B') };

/** Asked of everybody before any size is: which arms, how long a hold, weight and height. */
const asked = ({ sex, weightKg, heightCm, breathHoldS }: DrawnAdult): SizeReading[] => [
  ...readingsOf({ sex: sex === 'female' ? 1 : 2, 'arms-position': 1 }),
  reading('breath-hold-s', Math.round(breathHoldS), 'measured', { spread: 2 }),
  reading('weight-kg', Math.round(weightKg), 'measured', { spread: 0.5 }),
  reading('height-cm', Math.round(heightCm), 'measured', { spread: 1 }),
];
const girth = ({ girthCm }: DrawnAdult): SizeReading =>
  reading('girth-cm', Math.round(girthCm), 'measured', { spread: 1.5 });
const depth = ({ depthMm }: DrawnAdult): SizeReading =>
  reading('depth-mm', Math.round(depthMm), 'measured', { spread: 5 });
const breadth = ({ breadthMm }: DrawnAdult): SizeReading =>
  reading('breadth-mm', Math.round(breadthMm), 'measured', { spread: 5 });

/** Who measures breadth and depth with a caliper measures hips, shoulders and elbows at the same time. */
function acrossElsewhere({ sex, bmi, breadthMm }: DrawnAdult): SizeReading[] {
  // Hips from their girth by the survey's lines; shoulders and raised elbows of adults, from memory.
  const hips = sex === 'male' ? 4.65 + 0.294 * (51.5 + 1.82 * bmi) : 1.56 + 0.331 * (51.3 + 1.92 * bmi);
  const shoulders = (sex === 'male' ? 440 : 395) + 5 * (bmi - 25);
  return [
    ...readingsOf({
      'hip-breadth-mm': Math.round(10 * hips),
      'shoulder-breadth-mm': Math.round(shoulders),
      'elbow-breadth-mm': Math.round(Math.max(400, 0.95 * breadthMm)),
    }),
  ];
}

/** What is known, from most to least. */
const KNOWN: Readonly<Record<string, (adult: DrawnAdult) => SizeReading[]>> = {
  extents: (adult) => [...asked(adult), breadth(adult), depth(adult), ...acrossElsewhere(adult)],
  'girth and depth': (adult) => [...asked(adult), girth(adult), depth(adult), ...acrossElsewhere(adult)],
  girth: (adult) => [...asked(adult), girth(adult), ...acrossElsewhere(adult)],
  'girth, hips and elbows unknown': (adult) => [...asked(adult), girth(adult)],
  'weight and height': (adult) => [...asked(adult), ...acrossElsewhere(adult)],
  nothing: () => [],
};

const check = (adult: DrawnAdult, known: string, booked: 'A' | 'B'): PreCheck =>
  preCheck(
    preCheckQuestion({
      scanner: SCANNERS[booked],
      others: [SCANNERS[booked === 'A' ? 'B' : 'A']],
      protocol: { id: 'abdomen', version: 1, document: DEMO_PROTOCOLS.abdomen.document, sequences: DEMO_PROTOCOLS.abdomen.sequences.map((prescription, position) => ({ id: String(position), position, prescription })) },
      readings: KNOWN[known]!(adult),
      booking: { slotMinutes: 45 },
    }),
  );

describe('a population of adults at the standard policy, the demonstration’s scanners and abdomen', () => {
  const adults = drawnAdults(ADULTS, 20261201);

  it('is drawn as its tables say', () => {
    const many = drawnAdults(4000, 7);
    const share = (where: (adult: DrawnAdult) => boolean, of = many) => of.filter(where).length / of.length;
    for (const [sex, girthP95, depthP95] of [['male', 130.9, 312], ['female', 129.9, 304]] as const) {
      const own = many.filter((adult) => adult.sex === sex);
      // Of 2,000 draws 5 % are above the 95th percentile to ± 1.5 % (three binomial SDs).
      expect(Math.abs(share(({ girthCm }) => girthCm > girthP95, own) - 0.05)).toBeLessThan(0.015);
      // Depth comes through the regression from girth, and the two levels: looser.
      expect(Math.abs(share(({ depthMm }) => depthMm > depthP95, own) - 0.05)).toBeLessThan(0.04);
    }
    // Obesity (BMI ≥ 30) in two of five US adults, 35 and over in one of six or seven (from memory).
    expect(share(({ bmi }) => bmi >= 30)).toBeGreaterThan(0.33);
    expect(share(({ bmi }) => bmi >= 30)).toBeLessThan(0.47);
    expect(share(({ bmi }) => bmi >= 35)).toBeGreaterThan(0.12);
    expect(share(({ bmi }) => bmi >= 35)).toBeLessThan(0.25);
  });

  it(
    `what ${ADULTS} of them are told, by what is known`,
    async () => {
      const folds = ({ findings }: PreCheck) => findings.some(({ subject }) => subject === 'fold');
      const share = (checks: readonly PreCheck[], where: (one: PreCheck) => boolean) => checks.filter(where).length / checks.length;
      // Three binomial SDs of a share near a half.
      const slack = 1.5 / Math.sqrt(ADULTS);
      for (const booked of ['A', 'B'] as const) {
        const told: Record<string, PreCheck[]> = {};
        for (const known of Object.keys(KNOWN)) {
          const checks: PreCheck[] = (told[known] = []);
          for (const adult of adults) {
            await progress(`population, ${booked}, ${known}`, checks.length, ADULTS);
            checks.push(check(adult, known, booked));
          }
        }
        const asBooked = (known: string) => share(told[known]!, ({ result }) => result === 'as-booked');
        for (const [known, checks] of Object.entries(told)) {
          const percent = (where: (one: PreCheck) => boolean) => `${Math.round(100 * share(checks, where))} %`;
          const shares = PRE_CHECK_RESULTS.map((result) => `${result} ${percent((one) => one.result === result)}`);
          tally(`population, ${booked}, ${known}`, ADULTS, [...shares, `(fold found ${percent(folds)})`].join(', '));
        }
        // Unknown never passes: without weight, arms and sizes, or without what the opening may catch.
        for (const known of ['nothing', 'girth, hips and elbows unknown']) expect(asBooked(known)).toBe(0);
        expect(share(told.nothing!, ({ result }) => result === 'size-needed')).toBe(1);
        // Weight and height tell a size from a BMI of 35 on (half a unit for what was rounded), and below it never.
        told['weight and height']!.forEach(({ findings }, i) => {
          if (Math.abs(adults[i]!.bmi - 35) > 0.5) expect(findings.some(({ code }) => code === 'size-missing')).toBe(adults[i]!.bmi < 35);
        });
        // With everything measured nothing is left to ask for.
        expect(share(told.extents!, ({ result }) => result === 'size-needed')).toBe(0);
        // The protocol is set for a body of everyday size: a good part go as booked, and neither nobody nor most fold.
        expect(asBooked('extents')).toBeGreaterThan(0.3 - slack);
        expect(asBooked('extents')).toBeLessThan(0.5 + slack);
        expect(share(told.extents!, folds)).toBeGreaterThan(0);
        expect(share(told.extents!, folds)).toBeLessThan(0.3 + slack);
        // Less known, no more of them pass.
        expect(asBooked('girth')).toBeLessThan(asBooked('extents') + slack);
        expect(asBooked('weight and height')).toBeLessThan(asBooked('girth') + slack);
        // It is the larger who fold.
        const byGirth = adults.map(({ girthCm }, i) => ({ girthCm, folds: folds(told.extents![i]!) })).sort((a, b) => a.girthCm - b.girthCm);
        const half = Math.floor(byGirth.length / 2);
        const folding = (some: typeof byGirth) => some.filter((one) => one.folds).length;
        expect(folding(byGirth.slice(half))).toBeGreaterThan(folding(byGirth.slice(0, half)));
      }
    },
    NO_HURRY_MS,
  );
});
