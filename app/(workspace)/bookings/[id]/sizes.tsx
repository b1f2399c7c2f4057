import { ReadingForm } from '@/components/booking/reading-form';
import { SizeRecord } from '@/components/booking/size-record';
import type { SizeRecordView } from '@/lib/schemas/size-reading';
import { addReadings } from '../actions';
import { SizeRequests } from './size-requests';

/** The booking's sizes and both ways to come by more; the form comes first where the check asks for one. */
export function Sizes({ bookingId, record, today, mayRecord, asked }: {
  bookingId: string;
  record: SizeRecordView;
  today: string;
  mayRecord: boolean;
  asked: boolean;
}) {
  const form = mayRecord && <ReadingForm today={today} add={addReadings.bind(null, bookingId)} />;
  return (
    <section id="sizes" tabIndex={-1} aria-labelledby="sizes-title" className="scroll-mt-4 space-y-4">
      <h2 id="sizes-title" className="text-xl">Size record</h2>
      {asked && form}
      {asked && <SizeRequests bookingId={bookingId} />}
      <SizeRecord record={record} />
      {!asked && form}
      {!asked && <SizeRequests bookingId={bookingId} />}
    </section>
  );
}
