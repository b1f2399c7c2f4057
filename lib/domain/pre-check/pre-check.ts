import type { SitePolicy } from '@/lib/domain/case/model';
import { policyForExam, type KeepClearRequestDocument } from '@/lib/domain/keep-clear-request/document';
import type { PathwayPolicy } from '@/lib/domain/site-policy/document';
import { composePatient } from '@/lib/domain/size-reading/compose-patient';
import { QUANTITY_FACTS, type SizeQuantity } from '@/lib/domain/size-reading/quantities';
import type { SizeReading } from '@/lib/domain/size-reading/size-reading';
import { planCounts, type CheckedPlan } from './cases';
import { checkOnScanner, type CheckedProtocol, type CheckedScanner } from './check-on-scanner';
import { currentReadings, type CurrentReadings } from './current-readings';
import { nextAction } from './next-action';
import { resultRank, worstResult, type Alternative, type Finding, type PreCheck, type ScannerCheck } from './result';
import { sessionStanding, type Session } from './room';

export interface PreCheckQuestion {
  readonly booking: {
    readonly scheduledAt: Date;
    readonly slotMinutes: number;
    /** YYYY-MM-DD of surgery that changes the body's size, or ''. */
    readonly surgeryOn: string;
  };
  readonly readings: readonly SizeReading[];
  readonly scanner: CheckedScanner;
  /** The site's other scanners in use. */
  readonly others: readonly CheckedScanner[];
  readonly protocol: CheckedProtocol;
  readonly policy: SitePolicy;
  readonly pathway: PathwayPolicy;
  /** What a radiologist asked to be kept free of fold in this exam, and how much beside it is tolerated. */
  readonly request?: Pick<KeepClearRequestDocument, 'keepClear' | 'keepClearPreset' | 'toleratedFoldOutsidePct'>;
  readonly plan?: CheckedPlan;
  /** Sessions of the booked scanner on the booked day. */
  readonly sessions: readonly Session[];
}

const round = (minutes: number): number => Math.round(minutes * 10) / 10;

/** The protocol with the keep-clear area that was asked for in place of its own. */
const keepingClear = (protocol: CheckedProtocol, { keepClear, keepClearPreset }: NonNullable<PreCheckQuestion['request']>): CheckedProtocol => ({
  ...protocol, document: { ...protocol.document, keepClear, keepClearPreset },
});

/** The booking on any of the site's scanners, as far as its own sizes say. */
export function checkBookingOn(question: PreCheckQuestion, scanner: CheckedScanner, probabilities: boolean): ScannerCheck {
  const { booking, request } = question;
  const policy = policyForExam(question.policy, request?.toleratedFoldOutsidePct);
  const protocol = request ? keepingClear(question.protocol, request) : question.protocol;
  const { current } = countingReadings(question);
  const composed = composePatient({
    readings: current,
    region: protocol.document.region,
    tissueReachMm: scanner.document.scanner.tissueReachMm,
    policy,
    now: booking.scheduledAt,
  });
  return checkOnScanner({
    scanner, protocol, policy, probabilities,
    readings: current,
    missing: composed.missing,
    ...(composed.patient ? { patient: composed.patient } : {}),
    ...(question.plan ? { plan: question.plan } : {}),
  });
}

function countingReadings({ readings, booking, policy }: PreCheckQuestion): CurrentReadings {
  return currentReadings(readings, { scanAt: booking.scheduledAt, expiryDays: policy.readingExpiryDays, surgeryOn: booking.surgeryOn });
}

/** How another scanner stands; one that needs a size first is not ruled out, and does not count as found either. */
export function standingOf(check: ScannerCheck): Alternative {
  const { scannerId, scannerName, calls, findings } = check;
  const worst = findings.find((finding) => finding.calls === calls);
  const standing = calls === 'as-booked' || calls === 'plan-needed' ? 'fits' : calls === 'size-needed' ? 'open' : 'ruled-out';
  return { scannerId, scannerName, standing, reason: worst?.text ?? 'Nothing found that speaks against it.', open: findings.filter((finding) => finding.calls === 'size-needed') };
}

function slotFindings(question: PreCheckQuestion, scanMinutes: number): Finding[] {
  const { booking, sessions, scanner, pathway: { setUpMinutes } } = question;
  const findings: Finding[] = [];
  const needed = round(scanMinutes + setUpMinutes);
  if (scanMinutes > 0 && needed > booking.slotMinutes) {
    findings.push({
      subject: 'minutes', code: 'slot-too-short', calls: 'plan-needed',
      text: `${needed} min needed (${round(scanMinutes)} scan, ${setUpMinutes} set-up), ${booking.slotMinutes} booked.`,
    });
  }
  if (sessionStanding({ startsAt: booking.scheduledAt, minutes: booking.slotMinutes }, sessions) === 'outside') {
    findings.push({
      subject: 'session', code: 'outside-sessions', calls: 'another-scanner',
      text: `The slot lies outside the sessions of ${scanner.document.scanner.name} on that day.`,
    });
  }
  return findings;
}

/** Why sizes that were known once are missing now. */
function lapsedFindings({ lapsed }: CurrentReadings, findings: readonly Finding[]): Finding[] {
  const needed = new Set<SizeQuantity>(findings.flatMap(({ needs }) => needs ?? []));
  const relevant = lapsed.filter(({ quantity }) => needed.has(quantity) || quantity.startsWith('extent-'));
  return relevant.length === 0 ? [] : [{
    subject: 'sizes', code: 'readings-lapsed', calls: 'size-needed',
    text: `${relevant.map(({ text }) => text).join('; ')}.`,
    needs: relevant.map(({ quantity }) => quantity),
  }];
}

function basisOf(question: PreCheckQuestion, { current }: CurrentReadings): string[] {
  const { scanner, protocol, policy, plan, sessions, request } = question;
  const names = [...new Set(current.map(({ quantity }) => QUANTITY_FACTS[quantity].label))];
  const { limitsOwner, limitsCheckedOn } = scanner.document;
  return [
    names.length > 0 ? `Sizes: ${names.join(', ')}` : 'No size that counts',
    `${scanner.document.scanner.name}, version ${scanner.version}, limits by ${limitsOwner || 'nobody'}, ${limitsCheckedOn || 'no date'}`,
    `${protocol.document.name}, version ${protocol.version}; site policy, version ${policy.version}; sure at ${Math.round(policy.sureAt * 100)} %`,
    planCounts(plan, scanner.id) ? `The plan ${plan.state}, version ${plan.version}` : 'The protocol as booked',
    ...(request ? ['The keep-clear area a radiologist asked for'] : []),
    sessions.length === 0 ? 'Room unknown: no session of this scanner is entered for the day' : 'Sessions of the day as entered',
  ];
}

/**
 * What is known days ahead of whether booked scanner, slot and protocol can work for this person: a planning estimate.
 * Unknown is never passing. The answer rests on its arguments alone, not on the day it is asked.
 */
export function preCheck(question: PreCheckQuestion): PreCheck {
  const { booking, scanner, others } = question;
  const counting = countingReadings(question);
  const booked = checkBookingOn(question, scanner, true);
  const own = [...booked.findings, ...slotFindings(question, booked.scanMinutes)];
  const all = [...own, ...lapsedFindings(counting, own)];
  const calls = worstResult(all.map((finding) => finding.calls));
  const onlyTime = all.every((finding) => finding.calls !== 'another-scanner' || finding.subject === 'session');
  const alternatives = calls === 'another-scanner' && !onlyTime
    ? others.filter(({ id }) => id !== scanner.id).map((other) => standingOf(checkBookingOn(question, other, false)))
    : [];
  const nowhere = calls === 'another-scanner' && !onlyTime && alternatives.every(({ standing }) => standing === 'ruled-out');
  const result = nowhere ? 'escalate' : calls;
  const findings = [
    ...all,
    ...(nowhere
      ? [{ subject: 'limits' as const, code: 'no-scanner-left', calls: 'escalate' as const, text: 'No scanner of this site is left: a lead decides.' }]
      : []),
  ].sort((a, b) => resultRank(b.calls) - resultRank(a.calls));
  const minutesNeeded = booked.sequences.length > 0 ? round(booked.scanMinutes + question.pathway.setUpMinutes) : 0;
  return {
    result,
    findings,
    next: nextAction({ result, findings, alternatives, ...(question.plan ? { planState: question.plan.state } : {}) }),
    booked: { ...booked, scanMinutes: round(booked.scanMinutes) },
    alternatives,
    minutesNeeded,
    minutesOver: Math.max(0, round(minutesNeeded - booking.slotMinutes)),
    basis: basisOf(question, counting),
  };
}
