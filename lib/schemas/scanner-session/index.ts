import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import { moment, refused, strict } from '@/lib/schemas/fields/fields';
import { idSchema } from '@/lib/schemas/fields/ids';

const error = refused('1 to 60 sessions');

export const addSessionsInput = strict({
  scannerId: idSchema.describe('Scanner that is staffed.'),
  sessions: z.array(strict({ startsAt: moment('Begin of the session.'), endsAt: moment('End of the session.') }), { error }).min(1, { error }).max(60, { error }),
});

export interface SessionView {
  readonly id: string;
  readonly scannerId: string;
  readonly scannerName: string;
  readonly startsAt: string;
  readonly endsAt: string;
  readonly minutes: number;
  /** Minutes neither booked nor proposed. */
  readonly minutesFree: number;
}
