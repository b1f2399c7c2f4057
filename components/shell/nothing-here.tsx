import { LinkButton } from '@/components/ui/button';
import { MessagePage } from './message-page';

/** The same words for what is missing and for what is not the reader's to see. */
export function NothingHere({ inside = false }: { inside?: boolean }) {
  return (
    <MessagePage
      inside={inside}
      title="There is nothing at this address"
      actions={
        <>
          <LinkButton href="/today" variant="primary">
            Go to today’s bookings
          </LinkButton>
          <LinkButton href="/">Front page</LinkButton>
        </>
      }
    >
      <p>It may have been moved or erased, or it is not yours to see.</p>
    </MessagePage>
  );
}
