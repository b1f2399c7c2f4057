'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { Panel } from '@/components/ui/panel';
import { useStatus } from '@/components/ui/status';
import { TextInput } from '@/components/ui/text-input';
import { formatMoment } from '@/lib/presentation/moment';
import type { ActionResult } from '@/lib/schemas/action-result';
import type { SizeRequestView } from '@/lib/schemas/size-request';

type Link = ActionResult<{ id: string; link: string }>;

export interface SizeRequestActions {
  readonly ask: (address?: string) => Promise<Link>;
  readonly send: (id: string, address?: string) => Promise<Link>;
  readonly copy: (id: string) => Promise<Link>;
  readonly cancel: (id: string) => Promise<ActionResult<unknown>>;
}

const STATUS: Readonly<Record<SizeRequestView['status'], string>> = {
  open: 'Not answered yet', answered: 'Answered', cancelled: 'Cancelled', expired: 'Not answered in time',
};
const MAIL = { queued: 'on its way', sent: 'handed to the mail server', failed: 'not accepted by the mail server' } as const;
const moment = (iso: string) => formatMoment(new Date(iso));

function RequestFacts({ request }: { request: SizeRequestView }) {
  return (
    <div>
      <p>
        <span className="font-semibold">{STATUS[request.status]}</span> · asked {moment(request.askedAt)}
        {request.status === 'open' && <> · until {moment(request.expiresAt)}</>}
      </p>
      {request.sentCount > 0 && (
        <p className="text-sm text-ink-soft">
          Mailed {request.sentCount === 1 ? 'once' : `${request.sentCount} times`}
          {request.addressMasked && <> to <span className="figures">{request.addressMasked}</span></>}
          {request.mail && <>, the last one {MAIL[request.mail.status]}</>}
        </p>
      )}
      {request.status === 'open' && request.mail?.problem && (
        <p className="mt-1 text-sm">The mail server said: {request.mail.problem}</p>
      )}
    </div>
  );
}

/** Asking the patient for sizes by a link, and what became of it. */
export function SizeRequestPanel({ requests, mayAsk, actions }: { requests: readonly SizeRequestView[]; mayAsk: boolean; actions: SizeRequestActions }) {
  const { say } = useStatus();
  const [address, setAddress] = useState('');
  const [error, setError] = useState<string | undefined>();
  const [problem, setProblem] = useState<string | null>(null);
  const [link, setLink] = useState<string | null>(null);
  const [pending, setPending] = useState(false);
  const open = requests.find(({ status }) => status === 'open');

  const run = async <T,>(work: () => Promise<ActionResult<T>>, done: (data: T) => void) => {
    setPending(true);
    setError(undefined);
    setProblem(null);
    const result = await work().catch((): ActionResult<T> => ({ ok: false, error: { code: 'unavailable', message: 'The server did not answer. Try again shortly.' } }));
    setPending(false);
    if (result.ok) return done(result.data);
    setError(result.error.fields?.address);
    if (!result.error.fields?.address) setProblem(result.error.message);
  };
  const mailed = (words: string) => () => {
    setAddress('');
    say(words);
  };

  return (
    <Panel title="Ask for sizes" level={2}>
      <div className="space-y-4">
        {requests.length === 0 && <p className="text-ink-soft">Nobody has been asked yet. The link opens a short form without an account.</p>}
        {requests.map((request) => <RequestFacts key={request.id} request={request} />)}
        {problem && <Notice tone="error" live title={problem} />}
        {link && (
          <TextInput label="Link to hand over" value={link} readOnly figures onFocus={(event) => event.target.select()} hint="Whoever has it can answer, once. Hand it to the patient only." />
        )}
        {mayAsk && (
          <>
            <TextInput
              label={open ? 'Another e-mail address' : 'E-mail address'}
              type="email"
              optional
              autoComplete="off"
              value={address}
              error={error}
              onChange={(event) => setAddress(event.target.value)}
              hint="Kept sealed until the request is answered, cancelled or too old; then it is erased."
            />
            <div className="flex flex-wrap gap-3">
              {open ? (
                <>
                  <Button pending={pending} onClick={() => void run(() => actions.send(open.id, address || undefined), mailed('The request is on its way again.'))}>
                    {address ? 'Send to this address' : 'Send a reminder'}
                  </Button>
                  <Button pending={pending} onClick={() => void run(() => actions.copy(open.id), (data) => setLink(data.link))}>Show the link</Button>
                  <Button variant="quiet" pending={pending} onClick={() => void run(() => actions.cancel(open.id), () => { setLink(null); say('The request is cancelled and its address erased.'); })}>
                    Cancel the request
                  </Button>
                </>
              ) : (
                <>
                  <Button variant="primary" pending={pending} disabled={address === ''} onClick={() => void run(() => actions.ask(address), mailed('The request is on its way.'))}>
                    Send by e-mail
                  </Button>
                  <Button pending={pending} onClick={() => void run(() => actions.ask(), (data) => setLink(data.link))}>Make a link to copy</Button>
                </>
              )}
            </div>
          </>
        )}
      </div>
    </Panel>
  );
}
