import { Badge } from '@/components/ui/badge';
import { Table, Td, Th, Tr } from '@/components/ui/table';
import type { ActionResult } from '@/lib/schemas/action-result';
import { RevokeToken } from './revoke-token';

export interface TokenRow {
  readonly id: string;
  readonly name: string;
  readonly scopes: readonly string[];
  readonly madeBy: string;
  readonly madeOn: string;
  readonly expiresOn: string;
  readonly state: 'works' | 'expired' | 'revoked';
}

const STATE = {
  works: { label: 'Works', edge: 'solid' },
  expired: { label: 'Expired', edge: 'dashed' },
  revoked: { label: 'Revoked', edge: 'dashed' },
} as const;

export function TokenTable({
  tokens,
  revoke,
}: {
  tokens: readonly TokenRow[];
  revoke: (input: { id: string }) => Promise<ActionResult<unknown>>;
}) {
  return (
    <Table caption="API tokens of this site">
      <thead>
        <tr>
          <Th>Name</Th>
          <Th>May</Th>
          <Th>Made</Th>
          <Th>Until</Th>
          <Th>State</Th>
          <Th>
            <span className="sr-only">Action</span>
          </Th>
        </tr>
      </thead>
      <tbody>
        {tokens.map((token) => (
          <Tr key={token.id}>
            <Td className="font-semibold">{token.name}</Td>
            <Td className="figures text-sm">{token.scopes.join(' ')}</Td>
            <Td>
              <span className="figures whitespace-nowrap">{token.madeOn}</span>
              <span className="block text-sm text-ink-soft">{token.madeBy}</span>
            </Td>
            <Td className="figures whitespace-nowrap">{token.expiresOn}</Td>
            <Td>
              <Badge edge={STATE[token.state].edge}>{STATE[token.state].label}</Badge>
            </Td>
            <Td>{token.state === 'works' && <RevokeToken id={token.id} name={token.name} revoke={revoke} />}</Td>
          </Tr>
        ))}
      </tbody>
    </Table>
  );
}
