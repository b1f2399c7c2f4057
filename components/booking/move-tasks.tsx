import Link from 'next/link';
import { Badge } from '@/components/ui/badge';
import { Table, Td, Th, Tr } from '@/components/ui/table';
import type { MoveView } from '@/lib/schemas/move-proposal';
import { placeWords } from './booking-words';
import { PlaceWords } from './place-words';

const STATUS = { open: 'open', agreed: 'followed', withdrawn: 'taken back', replaced: 'replaced' } as const;

/** Moves side by side: what is booked now, and what was proposed. */
export function MoveTasks({ moves, caption, settled = false }: { moves: readonly MoveView[]; caption: string; settled?: boolean }) {
  return (
    <Table caption={caption}>
      <thead><tr><Th>Accession</Th><Th>{settled ? 'Was booked' : 'Booked now'}</Th><Th>Proposed</Th><Th>Why</Th><Th>By</Th><Th>State</Th></tr></thead>
      <tbody>
        {moves.map((move) => (
          <Tr key={move.id} className="align-top">
            <Td><Link href={`/bookings/${move.bookingId}#move`} className="text-link figures font-semibold whitespace-nowrap">{move.accession}</Link></Td>
            <Td><PlaceWords {...placeWords(move.status === 'agreed' ? move.before : move.booked)} /></Td>
            <Td><PlaceWords {...placeWords(move.proposed)} /></Td>
            <Td className="max-w-72">{move.reason || <span className="text-ink-soft">not said</span>}</Td>
            <Td className="whitespace-nowrap">{move.proposedBy}</Td>
            <Td>{move.differs ? <Badge tone="strong">booked otherwise since</Badge> : <Badge edge={move.status === 'open' ? 'dotted' : 'solid'}>{STATUS[move.status]}</Badge>}</Td>
          </Tr>
        ))}
      </tbody>
    </Table>
  );
}
