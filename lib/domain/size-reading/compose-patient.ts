import type { BodyRegion, Patient, Reading, Side, SitePolicy } from '@/lib/domain/case/model';
import { deriveSizes } from '@/lib/domain/size-reading/derive-sizes';
import { NewestReadings } from '@/lib/domain/size-reading/newest-readings';
import { isExpired, type SizeReading } from '@/lib/domain/size-reading/size-reading';

/** What stands in for what nobody has measured yet; each is shown as assumed. */
const ASSUMED = {
  armBreadthMm: 110,
  armDepthMm: 120,
  armGapMm: 10,
  breathHoldS: { value: 15, spread: 3 },
  breathPeriodS: { value: 4, spread: 0.6 },
} as const;

/** How far two routes to one size may lie apart before it is said, beside their spreads: mm. */
const AGREES_WITHIN_MM = 15;

export interface ComposedPatient {
  readonly patient?: Patient;
  readonly missing: readonly string[];
  readonly remarks: readonly string[];
}

interface Question {
  readonly readings: readonly SizeReading[];
  readonly region: BodyRegion;
  readonly tissueReachMm: number;
  readonly policy: Pick<SitePolicy, 'readingExpiryDays'>;
  readonly now: Date;
}

interface Span {
  readonly low: Reading;
  readonly high: Reading;
  readonly at: number;
  readonly route: string;
}

const widthOf = (span: Span): number => span.low.value + span.high.value;

/** A whole size taken as centred: the two halves share its one error. */
function halves(whole: Reading): Pick<Span, 'low' | 'high'> {
  const half: Reading = { ...whole, value: whole.value / 2, spread: whole.spread / 2 };
  return { low: half, high: half };
}

/** Every way the size is known by measurement: two sides apart, or one whole size. */
function spans(newest: NewestReadings, low: Side, high: Side, whole: 'breadth-mm' | 'depth-mm'): Span[] {
  const found: Span[] = [];
  const [a, b] = [newest.get(`extent-${low}-mm`), newest.get(`extent-${high}-mm`)];
  if (a && b) {
    const at = Math.min(a.recordedAt.getTime(), b.recordedAt.getTime());
    found.push({ low: newest.reading(a), high: newest.reading(b), at, route: `${low} and ${high}` });
  }
  const size = newest.get(whole);
  if (size) {
    found.push({ ...halves(newest.reading(size)), at: size.recordedAt.getTime(), route: whole === 'breadth-mm' ? 'breadth' : 'depth' });
  }
  return found;
}

/** The newest way wins; one that does not agree is said, not hidden. */
function choose(found: readonly Span[], remarks: string[]): Span | undefined {
  const [first, ...others] = [...found].sort((a, b) => b.at - a.at);
  for (const other of others) {
    if (!first) break;
    const apart = Math.abs(widthOf(first) - widthOf(other));
    if (apart > AGREES_WITHIN_MM + 2 * (first.low.spread + other.low.spread)) {
      remarks.push(
        `Two readings do not agree: ${Math.round(widthOf(first))} mm from ${first.route}, ` +
          `${Math.round(widthOf(other))} mm from ${other.route}. The newer one is used.`,
      );
    }
  }
  return first;
}

function armsOf(newest: NewestReadings): Patient['arms'] {
  const position = newest.get('arms-position')?.value;
  return {
    position: position === 1 ? 'up' : position === 2 ? 'cannot-be-raised' : 'down',
    breadthMm: newest.get('arm-breadth-mm')?.value ?? ASSUMED.armBreadthMm,
    depthMm: newest.get('arm-depth-mm')?.value ?? ASSUMED.armDepthMm,
    gapMm: newest.get('arm-gap-mm')?.value ?? ASSUMED.armGapMm,
  };
}

function expiryRemarks({ readings, now, policy }: Question, newest: NewestReadings): string[] {
  const old = readings.filter((reading) => newest.get(reading.quantity) === reading && isExpired(reading, now, policy.readingExpiryDays));
  return old.length === 0 ? [] : [`Older than ${policy.readingExpiryDays} days: ${old.map((reading) => newest.label(reading)).join(', ')}.`];
}

/** The patient as the engine takes it, from the newest of every reading; absent while a size it needs is missing. */
export function composePatient(question: Question): ComposedPatient {
  const { region, tissueReachMm } = question;
  const newest = new NewestReadings(question.readings);
  const remarks = expiryRemarks(question, newest);
  const measuredAcross = choose(spans(newest, 'right', 'left', 'breadth-mm'), remarks);
  const measuredDepth = choose(spans(newest, 'anterior', 'posterior', 'depth-mm'), remarks);
  const derived = measuredAcross && measuredDepth ? undefined : deriveSizes(newest, region);
  if (derived) remarks.push(...derived.remarks);
  const across = measuredAcross ?? (derived?.breadth && halves(derived.breadth));
  const depth = measuredDepth ?? (derived?.depth && halves(derived.depth));
  const missing = [
    ...(across ? [] : ['right–left size: breadth, or girth with sex']),
    ...(depth ? [] : ['front–back size: depth, or girth with sex']),
  ];
  if (!across || !depth) return { missing, remarks };
  const reach: Reading = { value: tissueReachMm, source: 'policy-default', spread: 0 };
  const [weightKg, heightCm, sex] = [newest.get('weight-kg'), newest.get('height-cm'), newest.get('sex')];
  if (!weightKg) remarks.push('No weight: the table load cannot be checked.');
  return {
    patient: {
      region,
      extents: {
        right: across.low,
        left: across.high,
        anterior: depth.low,
        posterior: depth.high,
        superior: newest.readingOr('extent-superior-mm', reach),
        inferior: newest.readingOr('extent-inferior-mm', reach),
      },
      arms: armsOf(newest),
      ...(weightKg ? { weightKg: newest.reading(weightKg) } : {}),
      ...(heightCm ? { heightCm: newest.reading(heightCm) } : {}),
      ...(sex ? { sex: sex.value === 1 ? 'female' as const : 'male' as const } : {}),
      breathHoldS: newest.readingOr('breath-hold-s', { ...ASSUMED.breathHoldS, source: 'policy-default' }),
      breathPeriodS: newest.readingOr('breath-period-s', { ...ASSUMED.breathPeriodS, source: 'policy-default' }),
      position: 'head-first-supine',
      lateralOffsetMm: newest.get('lateral-offset-mm')?.value ?? 0,
      isocentreZMm: 0,
    },
    missing,
    remarks,
  };
}
