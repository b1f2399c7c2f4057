'use client';

import { useRouter } from 'next/navigation';
import { ActionButton } from '@/components/ui/action-button';
import { useStatus } from '@/components/ui/status';
import type { PersonStatus } from '@/lib/domain/people';
import type { ActionResult } from '@/lib/schemas/action-result';

type PersonAction = (input: { id: string }) => Promise<ActionResult<unknown>>;

/** What a lead can do to an account besides its name and roles. */
export function PersonActions({
  person,
  isSelf,
  resend,
  signOut,
  disable,
  enable,
}: {
  person: { id: string; displayName: string; status: PersonStatus; liveTokens: number };
  isSelf: boolean;
  resend: PersonAction;
  signOut: PersonAction;
  disable: PersonAction;
  enable: PersonAction;
}) {
  const router = useRouter();
  const { say } = useStatus();
  const { id, displayName: name, status, liveTokens } = person;
  const done = (message: string) => () => {
    say(message);
    router.refresh();
  };

  if (status === 'disabled') {
    return (
      <ActionButton action={() => enable({ id })} onDone={done(`${name} can sign in again.`)}>
        Enable the account
      </ActionButton>
    );
  }
  const tokens = liveTokens === 1 ? '1 API token' : `${liveTokens} API tokens`;
  return (
    <div className="space-y-5">
      {status === 'invited' && (
        <ActionButton action={() => resend({ id })} onDone={done(`A new invitation to ${name} is on its way.`)}>
          Send the invitation again
        </ActionButton>
      )}
      {status === 'active' && (
        <ActionButton
          action={() => signOut({ id })}
          onDone={done(`${name} is signed out everywhere.`)}
          confirm={{
            question: isSelf
              ? 'This ends your sessions on every device, this one too.'
              : `This ends ${name}’s sessions on every device. Edits that were not saved there are lost.`,
            yes: 'Sign out everywhere',
            no: 'Keep signed in',
          }}
        >
          Sign out everywhere
        </ActionButton>
      )}
      <ActionButton
        action={() => disable({ id })}
        onDone={done(`${name}’s account is disabled.`)}
        confirm={{
          question: (
            <>
              {name} can no longer sign in and is signed out at once. What they did stays in the records.
              {liveTokens > 0 && ` ${tokens} made by ${name} keep working until revoked.`}
            </>
          ),
          yes: 'Disable the account',
          no: 'Keep the account',
        }}
      >
        Disable the account
      </ActionButton>
    </div>
  );
}
