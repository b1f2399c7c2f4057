import { SizeRequestPanel } from '@/components/size-request/size-request-panel';
import { mayAttempt } from '@/lib/domain/access';
import { loadPage } from '@/lib/http/load-page';
import { listSizeRequests } from '@/lib/services/size-request/list-size-requests';
import { askSizeAction, cancelRequestAction, copyLinkAction, sendRequestAction } from './size-request-actions';

/** The booking's size requests, for those who may see them. */
export async function SizeRequests({ bookingId }: { bookingId: string }) {
  const { requests, mayAsk } = await loadPage(async (context) => ({
    requests: mayAttempt(context.actor, 'size-request.read') ? await listSizeRequests(context, { bookingId }) : null,
    mayAsk: mayAttempt(context.actor, 'size-request.send'),
  }));
  if (!requests || (requests.length === 0 && !mayAsk)) return null;
  return (
    <SizeRequestPanel
      requests={requests}
      mayAsk={mayAsk}
      actions={{
        ask: askSizeAction.bind(null, bookingId),
        send: sendRequestAction.bind(null, bookingId),
        copy: copyLinkAction,
        cancel: cancelRequestAction.bind(null, bookingId),
      }}
    />
  );
}
