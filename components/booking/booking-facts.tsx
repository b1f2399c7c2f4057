import { Fact, Facts, Figure } from '@/components/ui/figure';
import { Panel } from '@/components/ui/panel';
import type { BookingRow } from './booking-row';
import { BookingVerdict } from './booking-verdict';

/** What is booked, and where it stands. */
export function BookingFacts({ row }: { row: BookingRow }) {
  return (
    <Panel title="Booked">
      <Facts>
        <Fact name="Scanner">{row.scanner}</Fact>
        <Fact name="Protocol">{row.protocol}</Fact>
        <Fact name="Body part">{row.region}</Fact>
        <Fact name="Slot">
          <Figure value={row.slotMinutes} unit="min" />
        </Fact>
        <Fact name="Scan time">
          {row.minutesNeeded === undefined ? (
            <span className="text-ink-soft">not worked out yet</span>
          ) : (
            <Figure value={Math.ceil(row.minutesNeeded)} unit="min, all sequences" />
          )}
        </Fact>
        <Fact name="Worst verdict">
          <BookingVerdict verdict={row.verdict} />
        </Fact>
        <Fact name="Plan">{row.plan}</Fact>
      </Facts>
      <p className="mt-4 text-sm text-ink-soft">
        A planning estimate from the sizes beside it. Trained staff and local policy decide.
      </p>
    </Panel>
  );
}
