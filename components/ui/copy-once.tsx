'use client';

import { useEffect, useRef, useState, type ReactNode } from 'react';
import { Button } from './button';
import { TextInput } from './text-input';

/** A secret that is on screen this one time: selected, with a button that copies it and what stands beside that. */
export function CopyOnce({ label, button, value, hint, children }: {
  label: string;
  button: string;
  value: string;
  hint?: ReactNode;
  children?: ReactNode;
}) {
  const field = useRef<HTMLInputElement>(null);
  const [copied, setCopied] = useState<'no' | 'yes' | 'refused'>('no');
  useEffect(() => field.current?.select(), []);

  const copy = async () => {
    try {
      await navigator.clipboard.writeText(value);
      setCopied('yes');
    } catch {
      // No permission, or a page served without encryption: the field is selected, so the keyboard does it.
      field.current?.select();
      setCopied('refused');
    }
  };

  return (
    <div className="space-y-4">
      <TextInput ref={field} label={label} value={value} hint={hint} readOnly figures spellCheck={false} />
      <div className="flex flex-wrap items-center gap-3">
        <Button variant="primary" onClick={() => void copy()}>
          {button}
        </Button>
        {children}
        <span role="status" className="text-sm text-ink-soft">
          {copied === 'yes' && 'Copied.'}
          {copied === 'refused' && 'The browser does not allow copying here. It is selected: press Ctrl+C.'}
        </span>
      </div>
    </div>
  );
}
