import { DomainError, type BodyRegion, type Patient, type Reading, type Scanner, type SitePolicy } from '@/lib/domain/case/model';
import { deriveSizes } from '@/lib/domain/size-reading/derive-sizes';
import { NewestReadings } from '@/lib/domain/size-reading/newest-readings';
import type { SizeQuantity } from '@/lib/domain/size-reading/quantities';
import type { SizeReading } from '@/lib/domain/size-reading/size-reading';
import { checkBore, type BoreCheck, type BoreExtras } from '@/lib/physics/bore/check-bore';
import { normalQuantile } from '@/lib/physics/certainty/normal';
import { isMeasured, NEAR_LIMIT } from './limits';
import type { Finding, ScannerCheck } from './result';

interface Opening {
  readonly findings: readonly Finding[];
  readonly opening?: ScannerCheck['opening'];
}

interface Question {
  readonly patient: Patient;
  readonly readings: readonly SizeReading[];
  readonly scanner: Scanner;
  readonly policy: Pick<SitePolicy, 'sureAt'>;
}

/** Regions whose size record is the trunk's own; elsewhere the trunk's size comes from girth, or weight and height. */
const TRUNK: readonly BodyRegion[] = ['abdomen', 'pelvis', 'chest'];
/** Sizes of the part itself, which say nothing of the trunk elsewhere. */
const OF_THE_PART = (quantity: SizeQuantity): boolean =>
  quantity === 'breadth-mm' || quantity === 'depth-mm' || quantity.startsWith('extent-');

const NEEDS: Readonly<Record<string, readonly SizeQuantity[]>> = {
  'hip breadth': ['height-cm', 'weight-kg'],
  'shoulder breadth': ['height-cm', 'weight-kg'],
  'breadth over the elbows': ['elbow-breadth-mm'],
};

/** The patient as the opening sees them, or undefined when the trunk's size is not known. */
function trunkPatient(patient: Patient, readings: readonly SizeReading[]): Patient | undefined {
  if (TRUNK.includes(patient.region)) return patient;
  const { breadth, depth } = deriveSizes(new NewestReadings(readings.filter(({ quantity }) => !OF_THE_PART(quantity))), 'pelvis');
  if (!breadth || !depth) return undefined;
  const half = (whole: Reading): Reading => ({ ...whole, value: whole.value / 2, spread: whole.spread / 2 });
  return {
    ...patient,
    extents: { ...patient.extents, right: half(breadth), left: half(breadth), anterior: half(depth), posterior: half(depth) },
  };
}

function extrasOf(newest: NewestReadings): BoreExtras {
  const read = (quantity: SizeQuantity): Reading | undefined => {
    const found = newest.get(quantity);
    return found && newest.reading(found);
  };
  const [hips, shoulders, elbows] = [read('hip-breadth-mm'), read('shoulder-breadth-mm'), read('elbow-breadth-mm')];
  return {
    ...(hips ? { hipBreadthMm: hips } : {}),
    ...(shoulders ? { shoulderBreadthMm: shoulders } : {}),
    ...(elbows ? { elbowBreadthMm: elbows } : {}),
  };
}

const measuredTrunk = ({ extents }: Patient): boolean =>
  [extents.right, extents.left, extents.anterior, extents.posterior].every(isMeasured);

/** What a clearance rests on; the arms' outer edge is the trunk's plus the arm, so the trunk's sizes decide there too. */
function restsOnMeasured(section: string, patient: Patient, extras: BoreExtras): boolean {
  if (section === 'hips') return extras.hipBreadthMm !== undefined && isMeasured(extras.hipBreadthMm);
  if (section === 'shoulders') return extras.shoulderBreadthMm !== undefined && isMeasured(extras.shoulderBreadthMm);
  if (section === 'elbows') return extras.elbowBreadthMm !== undefined && isMeasured(extras.elbowBreadthMm);
  return measuredTrunk(patient);
}

const MEASURE: Readonly<Record<string, readonly SizeQuantity[]>> = {
  hips: ['hip-breadth-mm'],
  shoulders: ['shoulder-breadth-mm'],
  elbows: ['elbow-breadth-mm'],
};

function judge(bore: BoreCheck, patient: Patient, extras: BoreExtras, { scanner, policy }: Question): Finding[] {
  const z = normalQuantile(policy.sureAt);
  const radius = scanner.boreDiameterMm / 2;
  const cm = `${Math.round(scanner.boreDiameterMm / 10)} cm opening`;
  return bore.sections.flatMap(({ section, clearanceMm, spreadMm }): Finding[] => {
    const measured = restsOnMeasured(section, patient, extras);
    const needs = MEASURE[section] ?? (['breadth-mm', 'depth-mm'] as const);
    const least = clearanceMm - z * spreadMm;
    const [mm, at] = [Math.round(clearanceMm), `at the ${section}`];
    const ruledOut = clearanceMm + z * spreadMm < 0 || (least < 0 && measured);
    if (ruledOut && section === 'arms' && patient.arms.position === 'down') {
      return [{
        subject: 'arms', code: 'arms-beside-too-wide', calls: 'plan-needed',
        text: `With the arms down this scanner’s ${cm} is too small by ${Math.max(1, Math.round(-least))} mm at the arms: ask whether they can be raised.`,
      }];
    }
    if (ruledOut) {
      return [{
        subject: 'opening', code: 'opening-too-small', calls: 'another-scanner',
        text: `This scanner’s ${cm} is too small ${at}: clearance ${mm} mm, ${Math.round(least)} mm when sure.`,
      }];
    }
    if (least < 0 || (radius - clearanceMm >= NEAR_LIMIT * radius && !measured)) {
      return [{
        subject: 'opening', code: 'opening-near-limit', calls: 'size-needed', needs, measuredOnly: true,
        text: `Clearance ${mm} mm ${at} of this scanner’s ${cm}: within 10 % of the limit, and the size was not measured.`,
      }];
    }
    return [];
  });
}

/** With the arms to be raised, the elbows count as well. */
function elbowsToo(findings: readonly Finding[], extras: BoreExtras): Finding[] {
  if (!findings.some(({ code }) => code === 'arms-beside-too-wide') || extras.elbowBreadthMm) return [...findings];
  return [...findings, {
    subject: 'opening', code: 'opening-unknown', calls: 'size-needed', needs: ['elbow-breadth-mm'],
    text: 'With the arms up the breadth over the elbows counts, and it is not known.',
  }];
}

/** Every section of the body in the opening, with the target at the isocentre. Unknown is never passing. */
export function checkOpening(question: Question): Opening {
  const patient = trunkPatient(question.patient, question.readings);
  if (!patient) {
    return {
      findings: [{ subject: 'opening', code: 'opening-unknown', calls: 'size-needed', needs: ['girth-cm', 'sex'], text: 'The trunk’s size is not known, so the clearance in the opening is not.' }],
    };
  }
  const newest = new NewestReadings(question.readings);
  const extras = extrasOf(newest);
  try {
    const bore = checkBore(patient, question.scanner, extras);
    const unknown = bore.unknown.map((name): Finding => ({
      subject: 'opening', code: 'opening-unknown', calls: 'size-needed', needs: (NEEDS[name] ?? []).filter((quantity) => !newest.get(quantity)), text: `Not known, and it counts in the opening: ${name}.`,
    }));
    const { tightest } = bore;
    return {
      findings: [...unknown, ...elbowsToo(judge(bore, patient, extras, question), extras)],
      ...(tightest ? { opening: { clearanceMm: Math.round(tightest.clearanceMm), spreadMm: Math.round(tightest.spreadMm), section: tightest.section } } : {}),
    };
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    return { findings: [{ subject: 'opening', code: 'opening-unknown', calls: 'size-needed', needs: ['weight-kg', 'height-cm'], text: `The clearance cannot be worked out: ${error.message}.` }] };
  }
}
