import Link from 'next/link';
import { REGION_WORDS } from '@/lib/presentation/anatomy-words';
import type { BookingListItem } from '@/lib/schemas/booking';

/** Whose bench this is. The reference is the only name a patient has here. */
export function BookingHeading({ booking, scannerName, opening }: { booking: BookingListItem; scannerName: string; opening: number }) {
  return (
    <>
      <p className="text-sm text-ink-soft">
        Booking ·{' '}
        <Link href={`/bench/${booking.id}/at-scanner`} className="text-link">
          at the scanner
        </Link>
      </p>
      <h1 className="text-base leading-snug font-semibold">
        <Link href={`/bookings/${booking.id}`} className="hover:underline">
          {booking.accession} · {REGION_WORDS[booking.region]}
        </Link>
      </h1>
      <p className="text-sm text-ink-soft">
        {scannerName}, {Math.round(opening / 10)} cm opening
      </p>
    </>
  );
}
