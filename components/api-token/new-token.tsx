'use client';

import { useEffect, useRef, useState } from 'react';
import { Button, LinkButton } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { TextInput } from '@/components/ui/text-input';

/** The one time a token's secret is on screen. */
export function NewToken({ token }: { token: { name: string; secret: string; expiresOn: string } }) {
  const field = useRef<HTMLInputElement>(null);
  const [copied, setCopied] = useState<'no' | 'yes' | 'refused'>('no');
  useEffect(() => field.current?.select(), []);

  const copy = async () => {
    try {
      await navigator.clipboard.writeText(token.secret);
      setCopied('yes');
    } catch {
      // No permission, or a page served without encryption: the field is selected, so the keyboard does it.
      field.current?.select();
      setCopied('refused');
    }
  };

  return (
    <div className="space-y-5">
      <Notice tone="done" live title={`Token “${token.name}” is made and works until ${token.expiresOn}.`}>
        Copy it now: it is shown this once and only its fingerprint is kept.
      </Notice>
      <TextInput ref={field} label="Token" value={token.secret} readOnly figures spellCheck={false} />
      <p>
        Send it with each request in the header <code className="figures">Authorization</code>, after the word{' '}
        <code className="figures">Bearer</code>.
      </p>
      <div className="flex flex-wrap items-center gap-3">
        <Button variant="primary" onClick={() => void copy()}>
          Copy the token
        </Button>
        <LinkButton href="/site/tokens">Done, I have kept it</LinkButton>
        <span role="status" className="text-sm text-ink-soft">
          {copied === 'yes' && 'Copied.'}
          {copied === 'refused' && 'The browser does not allow copying here. It is selected: press Ctrl+C.'}
        </span>
      </div>
    </div>
  );
}
