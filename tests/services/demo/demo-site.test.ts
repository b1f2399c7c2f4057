import { beforeAll, describe, expect, it } from 'vitest';
import { inTransaction } from '@/db/client';
import { DEMO_SITE_ID, demoId, seedDemo } from '@/db/seed';
import { DEMO_BOOKINGS } from '@/db/seed/demo-bookings';
import type { UserActor } from '@/lib/domain/access';
import type { Case } from '@/lib/domain/case/model';
import { assess, rankRemedies } from '@/lib/physics';
import { adoptRemedy } from '@/components/bench/state/adopt-remedy';
import { keepClearOf, type BenchDocument } from '@/components/bench/state/bench-document';
import { openBench } from '@/lib/services/booking/open-bench';
import { listTodaysBookings, listBookings } from '@/lib/services/booking/list-bookings';
import { ownerDatabase } from '@/tests/support/database';

const NOW = new Date('2026-05-04T06:00:00Z');
const ACCOUNTS = ['radiographer', 'coordinator', 'lead', 'radiologist', 'educator'].map((role) => ({
  email: `${role}@selvedge.example`, displayName: `Demo ${role}`, roles: [role], passwordHash: 'not used here',
}));
const radiographer: UserActor = {
  kind: 'user', siteId: DEMO_SITE_ID, userId: demoId('person/radiographer@selvedge.example'),
  displayName: 'Demo radiographer', roles: ['radiographer'],
};
const context = { actor: radiographer, now: NOW };

async function rowCounts(): Promise<Record<string, number>> {
  const tables = ['app_user', 'scanner_version', 'protocol_version', 'sequence', 'site_policy', 'booking', 'size_reading'] as const;
  return inTransaction(DEMO_SITE_ID, async (trx) => {
    const counts: Record<string, number> = {};
    for (const table of tables) {
      const row = await trx.selectFrom(table).select(({ fn }) => fn.countAll<string>().as('rows')).executeTakeFirstOrThrow();
      counts[table] = Number(row.rows);
    }
    return counts;
  });
}

/** The bench as it opens, as the browser holds it. */
async function openFirst(): Promise<{ document: BenchDocument; cases: Case[] }> {
  const { bookings } = await listTodaysBookings(context);
  const bench = await openBench(context, { bookingId: bookings[0]!.id });
  const document: BenchDocument = {
    patient: bench.sizeRecord.patient!,
    keepClear: bench.protocol.keepClear,
    scanner: bench.scanner.scanner,
    sequences: bench.protocol.sequences.map(({ id, prescription }) => ({ id, prescription, adopted: [] })),
  };
  return { document, cases: casesOf(document, bench.policy.policy) };
}

function casesOf(document: BenchDocument, policy: Case['policy']): Case[] {
  return document.sequences.map((sequence) => ({
    patient: document.patient,
    prescription: sequence.prescription,
    keepClear: keepClearOf(document, sequence),
    scanner: document.scanner,
    policy,
  }));
}

beforeAll(async () => {
  await seedDemo({ db: ownerDatabase(), accounts: ACCOUNTS, now: NOW });
});

describe('the demo site', () => {
  it('is seeded once: a second time changes nothing', async () => {
    const before = await rowCounts();
    await seedDemo({ db: ownerDatabase(), accounts: ACCOUNTS, now: NOW });
    expect(await rowCounts()).toEqual(before);
    expect(before.booking).toBe(DEMO_BOOKINGS.length);
    expect(before.sequence).toBe(9);
  });

  it('has bookings today and on the coming days, each with a state that fits what is known', async () => {
    const { bookings } = await listBookings(context, {});
    expect(bookings).toHaveLength(12);
    expect(new Set(bookings.map(({ scheduledAt }) => scheduledAt.slice(0, 10))).size).toBeGreaterThanOrEqual(4);
    expect(bookings.filter(({ verdict }) => verdict === undefined).map(({ accession }) => accession)).toEqual(['HB-2122']);
    expect(bookings[0]).toMatchObject({ accession: 'HB-2107', scannerName: 'Scanner B', protocolName: 'Abdomen, liver' });
  });

  it('shows a verdict for all five sequences of the first booking, and a set worth looking at', async () => {
    const { cases } = await openFirst();
    const verdicts = cases.map((question) => assess(question).verdict);
    expect(verdicts).toHaveLength(5);
    expect(verdicts).toContain('fold-in-keep-clear');
    expect(verdicts).toContain('fold-outside-keep-clear');
    expect(verdicts).toContain('no-fold-expected');
  });

  it('leaves no fold in the keep-clear area when the first remedy of each failing sequence is adopted', async () => {
    const opened = await openFirst();
    const { policy } = opened.cases[0]!;
    let { document } = opened;
    let adopted = 0;
    for (const { id } of document.sequences) {
      const index = document.sequences.findIndex((sequence) => sequence.id === id);
      const question = casesOf(document, policy)[index]!;
      const { now, remedies } = rankRemedies(question);
      if (now.verdict !== 'fold-in-keep-clear' && now.verdict !== 'cannot-be-scanned') continue;
      document = adoptRemedy(document, id, remedies[0]!);
      adopted += 1;
    }
    expect(adopted).toBeGreaterThanOrEqual(2);
    const after = casesOf(document, policy).map((question) => assess(question));
    expect(after.map(({ verdict }) => verdict)).not.toContain('fold-in-keep-clear');
    expect(after.map(({ verdict }) => verdict)).not.toContain('cannot-be-scanned');
    expect(after.every(({ fold }) => fold?.keepClearAreaMm2 === 0)).toBe(true);
  });

  it('moves on with the calendar, so that there is always something today', async () => {
    const later = new Date('2026-05-09T06:00:00Z');
    await seedDemo({ db: ownerDatabase(), accounts: ACCOUNTS, now: later });
    const { bookings } = await listTodaysBookings({ actor: radiographer, now: later });
    expect(bookings[0]?.accession).toBe('HB-2107');
    expect(bookings[0]?.scheduledAt).toBe('2026-05-09T08:20:00.000Z');
  });
});
