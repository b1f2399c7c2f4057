import type { Metadata } from 'next';
import { MessagePage } from '@/components/shell/message-page';
import { LinkButton } from '@/components/ui/button';

export const metadata: Metadata = { title: 'Nothing here' };

export default function NotFound() {
  return (
    <MessagePage
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
      <p>It may have been moved or erased, or it belongs to another site.</p>
    </MessagePage>
  );
}
