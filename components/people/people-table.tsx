import Link from 'next/link';
import { Badge } from '@/components/ui/badge';
import { Table, Td, Th, Tr } from '@/components/ui/table';
import { ROLE_LABELS } from '@/lib/domain/access';
import type { Person, PersonStatus } from '@/lib/domain/people';
import { formatDate } from '@/lib/presentation/moment';

/** Dotted: not there yet; dashed: no longer. */
const STATUS: Readonly<Record<PersonStatus, { label: string; edge: 'solid' | 'dotted' | 'dashed' }>> = {
  active: { label: 'Active', edge: 'solid' },
  invited: { label: 'Invited', edge: 'dotted' },
  disabled: { label: 'Disabled', edge: 'dashed' },
};

export function PersonStatusBadge({ status }: { status: PersonStatus }) {
  const { label, edge } = STATUS[status];
  return <Badge edge={edge}>{label}</Badge>;
}

export function PeopleTable({ people }: { people: readonly Person[] }) {
  return (
    <Table caption="People with an account at this site">
      <thead>
        <tr>
          <Th>Name</Th>
          <Th>E-mail address</Th>
          <Th>Roles</Th>
          <Th>Account</Th>
          <Th>Since</Th>
        </tr>
      </thead>
      <tbody>
        {people.map((person) => (
          <Tr key={person.id}>
            <Td>
              <Link href={`/site/people/${person.id}`} className="text-link font-semibold">
                {person.displayName}
              </Link>
            </Td>
            <Td>{person.email}</Td>
            <Td>{person.roles.map((role) => ROLE_LABELS[role]).join(', ')}</Td>
            <Td>
              <PersonStatusBadge status={person.status} />
            </Td>
            <Td className="figures whitespace-nowrap">{formatDate(person.createdAt)}</Td>
          </Tr>
        ))}
      </tbody>
    </Table>
  );
}
