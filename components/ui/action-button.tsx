'use client';

import { useRef, useState, type ReactNode } from 'react';
import type { ErrorView } from '@/lib/domain/errors';
import type { ActionResult } from '@/lib/schemas/action-result';
import { Button, type ButtonSize, type ButtonVariant } from './button';
import { FormProblem } from './form-problem';

/**
 * A button that changes something at once. With `confirm` the first press asks, in place, and the second does it:
 * nothing covers the page, and Esc or "Keep" goes back.
 */
export function ActionButton({
  children,
  action,
  onDone,
  confirm,
  pendingLabel = 'Working …',
  variant = 'secondary',
  size = 'md',
}: {
  children: ReactNode;
  action: () => Promise<ActionResult<unknown>>;
  onDone: () => void;
  confirm?: { question: ReactNode; yes: string; no: string };
  pendingLabel?: string;
  variant?: ButtonVariant;
  size?: ButtonSize;
}) {
  const [asking, setAsking] = useState(false);
  const [pending, setPending] = useState(false);
  const [problem, setProblem] = useState<Pick<ErrorView, 'message' | 'incidentId'> | null>(null);
  const opener = useRef<HTMLDivElement>(null);

  const back = () => {
    setAsking(false);
    requestAnimationFrame(() => opener.current?.querySelector('button')?.focus());
  };
  const run = async () => {
    setPending(true);
    setProblem(null);
    const result = await action().catch(() => null);
    setPending(false);
    if (!result)
      return setProblem({
        message: 'The server did not answer. Nothing is known to have changed; try again shortly.',
      });
    if (!result.ok) return setProblem(result.error);
    setAsking(false);
    onDone();
  };

  return (
    <div ref={opener} className="space-y-2">
      {asking && confirm ? (
        <div
          role="group"
          aria-label={confirm.yes}
          onKeyDown={(event) => event.key === 'Escape' && back()}
          className="space-y-2"
        >
          <p>{confirm.question}</p>
          <div className="flex flex-wrap gap-3">
            <Button
              variant="primary"
              pending={pending}
              pendingLabel={pendingLabel}
              onClick={() => void run()}
              autoFocus
            >
              {confirm.yes}
            </Button>
            <Button onClick={back}>{confirm.no}</Button>
          </div>
        </div>
      ) : (
        <Button
          variant={variant}
          size={size}
          pending={pending}
          pendingLabel={pendingLabel}
          onClick={() => (confirm ? setAsking(true) : void run())}
        >
          {children}
        </Button>
      )}
      <FormProblem problem={problem} />
    </div>
  );
}
