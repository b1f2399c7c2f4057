'use client';

import { useRouter } from 'next/navigation';
import { ActionButton } from '@/components/ui/action-button';
import { useStatus } from '@/components/ui/status';
import type { ActionResult } from '@/lib/schemas/action-result';

export function RevokeToken({
  id,
  name,
  revoke,
}: {
  id: string;
  name: string;
  revoke: (input: { id: string }) => Promise<ActionResult<unknown>>;
}) {
  const router = useRouter();
  const { say } = useStatus();
  return (
    <ActionButton
      action={() => revoke({ id })}
      onDone={() => {
        say(`Token “${name}” is revoked.`);
        router.refresh();
      }}
      confirm={{
        question: 'The system that holds it is refused from the next request on. This cannot be undone.',
        yes: `Revoke “${name}”`,
        no: 'Keep it',
      }}
    >
      Revoke
    </ActionButton>
  );
}
