import { inTransaction } from '@/db/client';
import { countResults, readBookingTable, type TableFilter, type TablePosition, type TableRow } from '@/db/queries/booking/booking-table';
import { authorise } from '@/lib/domain/access';
import { writeCsv } from '@/lib/csv/write-csv';
import { invalidField } from '@/lib/domain/errors';
import { startOfDay } from '@/lib/domain/site/local-day';
import type { BookingListItem } from '@/lib/schemas/booking';
import { bookingTableInput } from '@/lib/schemas/pre-check';
import { parseInput } from '@/lib/schemas/parse-input';
import { recordAudit } from '../audit/record-audit';
import type { ServiceContext } from '../context';
import { readPlace, writePlace } from '../booking/booking-place';
import { toBookingListItem } from '../booking/to-booking-view';

export interface BookingTablePage {
  readonly bookings: readonly BookingListItem[];
  /** Of these days and this scanner, protocol and search, whatever the result asked for. */
  readonly counts: Readonly<Record<string, number>>;
  readonly next?: string;
}

const CURSOR = /^(-?\d{1,16}(?:\.\d{1,20})?)_(.*)$/;
/** More than a person reads; a file that was cut says so in its last line. */
const MOST_EXPORTED = 20_000;

function readCursor(text: string | undefined): TablePosition | undefined {
  if (text === undefined) return undefined;
  const [, key, rest] = CURSOR.exec(text) ?? [];
  const place = readPlace(rest);
  if (!key || !place) throw invalidField('after', 'a cursor that no page gave; allowed: the “next” of the page before');
  return { key: Number(key), ...place };
}

const cursorOf = (row: TableRow): string => `${row.key}_${writePlace(row)}`;

function windowOf(asked: ReturnType<typeof bookingTableInput.parse>): TableFilter {
  if (asked.to < asked.from) throw invalidField('to', `${asked.to} given; allowed: ${asked.from} or later`);
  return {
    from: startOfDay(asked.from), before: startOfDay(asked.to, 1),
    ...(asked.result ? { result: asked.result } : {}),
    ...(asked.scanner ? { scannerId: asked.scanner } : {}),
    ...(asked.protocol ? { protocolId: asked.protocol } : {}),
    ...(asked.find ? { find: asked.find } : {}),
  };
}

/** Bookings of some days, filtered and ordered by the database, in pages that nothing written meanwhile can shift. */
export async function listBookingTable({ actor }: ServiceContext, input: unknown): Promise<BookingTablePage> {
  authorise(actor, 'booking.read');
  const asked = parseInput(bookingTableInput, input);
  const filter = windowOf(asked);
  const after = readCursor(asked.after);
  const { sort, descending, limit } = asked;
  return inTransaction(actor.siteId, async (trx) => {
    const found = await readBookingTable(trx, actor.siteId, { ...filter, sort, descending, limit, ...(after ? { after } : {}) });
    const { result: _result, ...whole } = filter;
    const counts = await countResults(trx, actor.siteId, whole);
    const page = found.slice(0, limit);
    const last = page.at(-1);
    return {
      bookings: page.map(toBookingListItem),
      counts,
      ...(found.length > page.length && last ? { next: cursorOf(last) } : {}),
    };
  });
}

const HEADER = ['Accession', 'Start', 'Slot minutes', 'Scanner', 'Protocol', 'Body part', 'Pre-check', 'Minutes over', 'Next', 'Stale', 'Worst verdict', 'Plan', 'Move proposed'];

/** The same rows as a file, all pages; chosen bookings only when ids are given. */
export async function exportBookings(context: ServiceContext, input: { readonly filter: unknown; readonly ids?: readonly string[] }): Promise<string> {
  const { actor } = context;
  authorise(actor, 'booking.export');
  const asked = parseInput(bookingTableInput, input.filter);
  const chosen = input.ids && new Set(input.ids);
  return inTransaction(actor.siteId, async (trx) => {
    const rows = await readBookingTable(trx, actor.siteId, {
      ...windowOf(asked), sort: asked.sort, descending: asked.descending, limit: MOST_EXPORTED,
    });
    const bookings = rows.slice(0, MOST_EXPORTED).map(toBookingListItem).filter(({ id }) => !chosen || chosen.has(id));
    await recordAudit(trx, context, { action: 'booking.export', subjectType: 'site', subjectId: actor.siteId, fields: ['bookings'] });
    const lines = bookings.map((one) => [
      one.accession, one.scheduledAt, one.slotMinutes, one.scannerName, one.protocolName, one.region, one.result ?? '', one.minutesOver ?? '',
      one.next?.text ?? '', one.stale ? 'yes' : 'no', one.verdict ?? '', one.planState ?? '', one.moveProposed ? 'yes' : 'no',
    ]);
    const cut = rows.length > MOST_EXPORTED ? [[`Cut after ${MOST_EXPORTED} bookings: choose fewer days.`]] : [];
    return writeCsv(HEADER, [...lines, ...cut]);
  });
}
