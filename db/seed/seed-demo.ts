import { inTransaction, type Database, type SiteTransaction } from '@/db/client';
import { insertBooking, writeBookingState } from '@/db/queries/booking/bookings';
import { findProtocol, insertProtocol } from '@/db/queries/protocol/protocols';
import { findScanner, insertScanner } from '@/db/queries/scanner/scanners';
import { addPolicyVersion } from '@/db/queries/site-policy/policies';
import { insertSessions } from '@/db/queries/scanner-session/scanner-sessions';
import { insertSizeReadings, listSizeReadings } from '@/db/queries/size-reading/size-readings';
import { DEFAULT_PATHWAY } from '@/lib/domain/site-policy/document';
import { assessAsBooked, stateOfAssessments } from '@/lib/domain/booking/assess-as-booked';
import { DEFAULT_POLICY } from '@/lib/domain/case/model';
import { composePatient } from '@/lib/domain/size-reading/compose-patient';
import { DEMO_BOOKINGS, type DemoBooking } from './demo-bookings';
import { DEMO_SITE_ID, demoId } from './demo-ids';
import { DEMO_PROTOCOLS } from './demo-protocols';
import { DEMO_SCANNERS } from './demo-scanners';
import { keepDemoCurrent } from './keep-demo-current';

export interface DemoPerson {
  readonly email: string;
  readonly displayName: string;
  readonly roles: readonly string[];
  readonly passwordHash: string;
}

export interface SeedDemo {
  /** A connection of the owner: the application itself may not make a site. */
  readonly db: Database;
  readonly accounts: readonly DemoPerson[];
  /** First day of the demo; absent: today. */
  readonly now?: Date;
}

const DAY_MS = 86_400_000;
const SESSION_DAYS = 14;
const siteId = DEMO_SITE_ID;
const policy = { ...DEFAULT_POLICY, version: 1 };

export const dayOf = (moment: Date): string => moment.toISOString().slice(0, 10);

export function scheduledAt(booking: DemoBooking, firstDay: Date): Date {
  return new Date(Date.parse(`${dayOf(firstDay)}T${booking.at}:00Z`) + booking.day * DAY_MS);
}

async function insertPeople(trx: SiteTransaction, accounts: readonly DemoPerson[]): Promise<void> {
  if (accounts.length === 0) throw new Error('The demo site needs at least one account to own what is in it.');
  await trx
    .insertInto('app_user')
    .values(
      accounts.map((person) => ({
        site_id: siteId,
        id: demoId(`person/${person.email}`),
        email: person.email,
        display_name: person.displayName,
        roles: [...person.roles],
        password_hash: person.passwordHash,
      })),
    )
    .onConflict((conflict) => conflict.doNothing())
    .execute();
}

async function insertSetup(trx: SiteTransaction, createdBy: string): Promise<void> {
  for (const [key, document] of Object.entries(DEMO_SCANNERS)) {
    await insertScanner(trx, { siteId, id: demoId(`scanner/${key}`), document, createdBy });
  }
  for (const [key, { document, sequences }] of Object.entries(DEMO_PROTOCOLS)) {
    await insertProtocol(trx, {
      siteId,
      id: demoId(`protocol/${key}`),
      document,
      sequences: sequences.map((prescription) => ({ schemaVersion: 1, prescription })),
      createdBy,
    });
  }
  await addPolicyVersion(trx, { siteId, version: 1, document: { schemaVersion: 2, policy, pathway: DEFAULT_PATHWAY }, createdBy });
}

/** The state lists show, worked out from the stored rows like that of any other booking. */
async function writeState(trx: SiteTransaction, booking: DemoBooking, bookingId: string, now: Date): Promise<void> {
  const scanner = await findScanner(trx, siteId, demoId(`scanner/${booking.scanner}`));
  const protocol = await findProtocol(trx, siteId, demoId(`protocol/${booking.protocol}`));
  if (!scanner || !protocol) throw new Error('The demo site has lost its scanners or protocols.');
  const { patient } = composePatient({
    readings: await listSizeReadings(trx, siteId, bookingId),
    region: protocol.document.region,
    tissueReachMm: scanner.document.scanner.tissueReachMm,
    policy,
    now,
  });
  if (!patient) return;
  const assessments = assessAsBooked({
    patient, policy,
    protocol: protocol.document,
    sequences: protocol.sequences,
    scanner: scanner.document.scanner,
  });
  await writeBookingState(trx, siteId, bookingId, stateOfAssessments(assessments), now);
}

/** Both scanners are staffed through the day for a fortnight, with an hour at noon when nobody is. */
async function insertDemoSessions(trx: SiteTransaction, createdBy: string, now: Date): Promise<void> {
  const at = (day: number, time: string) => new Date(Date.parse(`${dayOf(now)}T${time}:00Z`) + day * DAY_MS);
  const sessions = Object.keys(DEMO_SCANNERS).flatMap((key) =>
    Array.from({ length: SESSION_DAYS }, (_, day) =>
      [['08:00', '12:30'], ['13:00', '17:30']].map(([from, to]) => ({
        id: demoId(`session/${key}/${day}/${from}`), scannerId: demoId(`scanner/${key}`), startsAt: at(day, from!), endsAt: at(day, to!),
      })),
    ).flat(),
  );
  await insertSessions(trx, siteId, sessions, createdBy);
}

async function insertDemoBooking(trx: SiteTransaction, booking: DemoBooking, createdBy: string, now: Date): Promise<void> {
  const bookingId = await insertBooking(
    trx,
    {
      siteId,
      id: demoId(`booking/${booking.accession}`),
      accession: booking.accession,
      scheduledAt: scheduledAt(booking, now),
      slotMinutes: booking.slotMinutes,
      region: DEMO_PROTOCOLS[booking.protocol].document.region,
      scannerId: demoId(`scanner/${booking.scanner}`),
      protocolId: demoId(`protocol/${booking.protocol}`),
      source: 'import',
    },
    now,
  );
  const takenAt = new Date(now.getTime() - booking.sizedDaysBefore * DAY_MS);
  const readings = booking.readings.map((reading) => ({ ...reading, takenOn: dayOf(takenAt) }));
  await insertSizeReadings(trx, siteId, bookingId, readings, { by: createdBy, at: takenAt });
  await writeState(trx, booking, bookingId, now);
}

/**
 * Puts the invented site "Harbour MRI" into a database, once; a later call only adds people that are missing and moves
 * the demo bookings on, so that there is always something today.
 */
export async function seedDemo({ db, accounts, now = new Date() }: SeedDemo): Promise<void> {
  await inTransaction(
    siteId,
    async (trx) => {
      const made = await trx
        .insertInto('site')
        .values({ id: siteId, name: 'Harbour MRI', accession_pattern: 'HB-####' })
        .onConflict((conflict) => conflict.doNothing())
        .executeTakeFirst();
      await insertPeople(trx, accounts);
      if (made.numInsertedOrUpdatedRows !== 1n) return keepDemoCurrent(trx, now);
      const lead = accounts.find((person) => person.roles.includes('lead')) ?? accounts[0];
      const createdBy = demoId(`person/${lead?.email}`);
      await insertSetup(trx, createdBy);
      await insertDemoSessions(trx, createdBy, now);
      for (const booking of DEMO_BOOKINGS) await insertDemoBooking(trx, booking, createdBy, now);
    },
    db,
  );
}
