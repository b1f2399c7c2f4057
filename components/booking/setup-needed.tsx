import { LinkButton } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/page';

/** A booking names a scanner and a protocol; a new site has neither. */
export function SetupNeeded({ scanner, mayEdit }: { scanner: boolean; mayEdit: boolean }) {
  const noun = scanner ? 'scanner' : 'protocol';
  return (
    <EmptyState
      title={`No ${noun} yet`}
      action={
        mayEdit && (
          <LinkButton href={`/site/${noun}s/new`} variant="primary">
            Add the first {noun}
          </LinkButton>
        )
      }
    >
      {mayEdit
        ? `A booking names a scanner and a protocol. Start with the ${noun}.`
        : 'A booking names a scanner and a protocol. A lead of your site adds them.'}
    </EmptyState>
  );
}
