import Link from 'next/link';
import { Figure } from '@/components/ui/figure';
import { Table, Td, Th, Tr } from '@/components/ui/table';
import { RESULT_FILTERS, type WeekCell, type WeekView } from '@/lib/schemas/pre-check';
import { RESULT_WORDS } from '@/lib/presentation/pre-check-words';
import { tableHref } from './table-query';

/** Worst first: what needs someone is at the top of every cell. */
const ORDER = [...RESULT_FILTERS].filter((id) => id !== 'unchecked').reverse();

function Cell({ cell }: { cell: WeekCell }) {
  if (cell.bookings === 0) {
    return <span className="text-sm text-ink-soft">{cell.sessionMinutes === undefined ? 'nothing booked' : `nothing booked, ${cell.sessionMinutes} min free`}</span>;
  }
  const base = { from: cell.day, to: cell.day, scanner: cell.scannerId };
  const shown = [...ORDER, 'unchecked' as const].filter((id) => cell.results[id] > 0);
  return (
    <div className="space-y-1.5">
      <ul>
        {shown.map((id) => (
          <li key={id}>
            <Link href={tableHref(base, { result: id })} className="text-link inline-flex min-h-6 gap-2">
              <span className="figures">{cell.results[id]}</span> {RESULT_WORDS[id]}
            </Link>
          </li>
        ))}
      </ul>
      <p className="text-sm text-ink-soft">
        <Figure value={cell.minutesBooked} unit="min booked" />, <Figure value={cell.minutesNeeded} unit="needed" />
        {cell.minutesUnknown > 0 && `, ${cell.minutesUnknown} not known`}
        <br />
        {cell.sessionMinutes === undefined ? 'room unknown' : <Figure value={Math.max(0, cell.sessionMinutes - cell.minutesBooked)} unit={`min left of ${cell.sessionMinutes}`} />}
        {cell.changed > 0 && <><br />{cell.changed} changed since yesterday</>}
        {cell.added > 0 && <><br />{cell.added} new since yesterday</>}
      </p>
    </div>
  );
}

/** Seven days by scanner. On a narrow screen the days scroll sideways inside the table. */
export function WeekGrid({ week, dayWords }: { week: WeekView; dayWords: Readonly<Record<string, string>> }) {
  return (
    <Table caption="The week by scanner and day">
      <thead>
        <tr>
          <Th>Scanner</Th>
          {week.days.map((day) => <Th key={day} className="min-w-40">{dayWords[day]}</Th>)}
        </tr>
      </thead>
      <tbody>
        {week.scanners.map(({ id, name }) => (
          <Tr key={id} className="align-top">
            <Th scope="row" className="border-b-0 align-top text-ink">{name}</Th>
            {week.days.map((day) => (
              <Td key={day} className="align-top"><Cell cell={week.cells.find((cell) => cell.day === day && cell.scannerId === id)!} /></Td>
            ))}
          </Tr>
        ))}
      </tbody>
    </Table>
  );
}
