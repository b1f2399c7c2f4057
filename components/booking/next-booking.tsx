import { LinkButton } from '@/components/ui/button';
import { WovenEdge } from '@/components/ui/woven-edge';
import type { BookingRow } from './booking-row';
import { BookingVerdict } from './booking-verdict';

/** The booking that comes next, opened in one press. */
export function NextBooking({ row, today }: { row: BookingRow; today: boolean }) {
  return (
    <section aria-labelledby="next-booking" className="mb-8 bg-paper">
      <WovenEdge />
      <div className="flex flex-wrap items-center justify-between gap-x-8 gap-y-4 border-x border-line px-5 py-5">
        <div className="flex flex-wrap items-center gap-x-6 gap-y-2">
          <p className="text-3xl">
            {!today && <span className="block text-xl font-semibold">{row.day}</span>}
            <span className="figures">{row.time}</span>
          </p>
          <div>
            <h2 id="next-booking" className="text-lg">
              <span className="sr-only">Next booking{today ? '' : `, ${row.day}`}: </span>
              <span className="figures">{row.accession}</span>
              <span className="font-normal"> · {row.region}</span>
            </h2>
            <p className="text-ink-soft">
              {row.protocol} · {row.scanner}
            </p>
          </div>
          <div>
            <BookingVerdict verdict={row.verdict} />
            <p className="text-sm text-ink-soft">{row.plan}</p>
          </div>
        </div>
        <LinkButton href={row.next.href} variant="primary">
          {row.next.label}
        </LinkButton>
      </div>
      <WovenEdge />
    </section>
  );
}
