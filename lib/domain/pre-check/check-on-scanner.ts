import { assessableCases, type CheckedPlan } from './cases';
import type { Patient, SitePolicy } from '@/lib/domain/case/model';
import type { ProtocolRecord } from '@/lib/domain/protocol/document';
import type { ScannerRecord } from '@/lib/domain/scanner/document';
import { NewestReadings } from '@/lib/domain/size-reading/newest-readings';
import type { SizeReading } from '@/lib/domain/size-reading/size-reading';
import { checkLargestFov } from './largest-fov';
import { checkOpening } from './opening';
import { worstResult, type Finding, type ScannerCheck } from './result';
import { checkSequences } from './sequences';
import { checkTableLoad } from './table-load';

export type CheckedScanner = Pick<ScannerRecord, 'id' | 'version' | 'archivedAt' | 'document'>;
export type CheckedProtocol = Pick<ProtocolRecord, 'id' | 'version' | 'document' | 'sequences'>;

export interface OnScanner {
  readonly scanner: CheckedScanner;
  readonly protocol: CheckedProtocol;
  readonly policy: SitePolicy;
  /** Those that count on the day of the scan. */
  readonly readings: readonly SizeReading[];
  /** Absent while a size it needs is missing. */
  readonly patient?: Patient;
  readonly missing: readonly string[];
  readonly plan?: CheckedPlan;
  readonly probabilities: boolean;
}

/** The site's own numbers with nobody who answers for them are no known limits. */
function limitFindings({ document, archivedAt }: CheckedScanner): Finding[] {
  const { name } = document.scanner;
  const findings: Finding[] = [];
  if (archivedAt) findings.push({ subject: 'limits', code: 'scanner-out-of-use', calls: 'another-scanner', text: `${name} is out of use.` });
  if (!document.limitsOwner || !document.limitsCheckedOn) {
    findings.push({ subject: 'limits', code: 'limits-not-confirmed', calls: 'escalate', text: `Nobody has put name and date to the limits of ${name}; a lead does.` });
  }
  return findings;
}

function armsFindings(newest: NewestReadings): Finding[] {
  return newest.get('arms-position')
    ? []
    : [{ subject: 'arms', code: 'arms-unknown', calls: 'size-needed', needs: ['arms-position'], text: 'Whether the arms can be raised is not known.' }];
}

/** Everything of one booking on one scanner but the time of day. */
export function checkOnScanner(question: OnScanner): ScannerCheck {
  const { scanner, patient, policy, readings, missing } = question;
  const { scanner: model } = scanner.document;
  const newest = new NewestReadings(readings);
  const weight = newest.get('weight-kg');
  const load = checkTableLoad(weight && newest.reading(weight), model);
  const findings: Finding[] = [...limitFindings(scanner), ...load.findings, ...armsFindings(newest)];
  const common = { scannerId: scanner.id, scannerName: model.name, ...(load.table ? { table: load.table } : {}) };
  if (!patient) {
    findings.push(...missing.map((text): Finding => ({
      subject: 'sizes', code: 'size-missing', calls: 'size-needed', text: `Missing: ${text}.`,
      needs: text.startsWith('front') ? ['depth-mm', 'girth-cm', 'sex'] : ['breadth-mm', 'girth-cm', 'sex'],
    })));
    return { ...common, calls: worstResult(findings.map(({ calls }) => calls)), findings, sequences: [], scanMinutes: 0 };
  }
  const cases = assessableCases(question, patient);
  const opening = checkOpening({ patient: cases[0]?.patient ?? patient, readings, scanner: model, policy });
  const fov = checkLargestFov(patient, cases.map(({ prescription }) => prescription), model);
  const folds = checkSequences(cases, newest.get('breath-hold-s') !== undefined, {
    signedOff: question.plan?.state === 'signed off',
    probabilities: question.probabilities,
  });
  findings.push(...opening.findings, ...fov.findings, ...folds.findings);
  return {
    ...common,
    calls: worstResult(findings.map(({ calls }) => calls)),
    findings,
    ...(opening.opening ? { opening: opening.opening } : {}),
    largestFov: fov.largestFov,
    sequences: folds.sequences,
    scanMinutes: folds.scanMinutes,
  };
}
