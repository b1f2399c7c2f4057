import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import { count, moment, refused, strict } from '@/lib/schemas/fields/fields';
import { idSchema } from '@/lib/schemas/fields/ids';

const slotMinutes = count({ min: 5, max: 480, unit: 'minutes', text: 'Length of the slot' });
const reason = z
  .string({ error: refused('text of up to 500 characters') }).trim().max(500, { error: refused('text of up to 500 characters') })
  .describe('Why, for whoever changes the booking; no name.').default('');

export const proposeMoveInput = strict({
  bookingId: idSchema,
  scannerId: idSchema.describe('Scanner to move to.'),
  scheduledAt: moment('Start of the slot to move to.'),
  slotMinutes,
  reason,
});
export type ProposeMove = z.output<typeof proposeMoveInput>;

/** What the booking system says now; only imports and the API change what is booked. */
export const changeBookedBody = strict({
  expectedVersion: z.int({ error: refused('the version that was read') }).min(1).describe('Version the change was made on.'),
  scheduledAt: moment('Start of the slot.'),
  slotMinutes,
  scannerId: idSchema.describe('Booked scanner.'),
  protocolId: idSchema.describe('Booked protocol.'),
});

export interface PlaceView {
  readonly scannerId: string;
  readonly scannerName: string;
  readonly scheduledAt: string;
  readonly slotMinutes: number;
}

export interface MoveView {
  readonly id: string;
  readonly bookingId: string;
  readonly accession: string;
  readonly protocolName: string;
  readonly status: 'open' | 'agreed' | 'withdrawn' | 'replaced';
  readonly proposed: PlaceView;
  readonly before: PlaceView;
  readonly booked: PlaceView;
  /** The booking system changed the booking, and to something else than was proposed. */
  readonly differs: boolean;
  readonly reason: string;
  readonly proposedBy: string;
  readonly proposedAt: string;
  readonly settledAt?: string;
}

export interface Suggestion {
  readonly scannerId: string;
  readonly scannerName: string;
  readonly standing: 'fits' | 'open' | 'ruled-out';
  readonly reason: string;
  /** Starts with room, soonest first; absent: room unknown, no session is entered for these days. */
  readonly starts?: readonly string[];
}

export interface Suggestions {
  readonly slotMinutes: number;
  readonly scanners: readonly Suggestion[];
}
