'use client';

import { useEffect, useId, useRef, type ReactNode } from 'react';
import { IconButton } from './button';
import { CrossIcon } from './icons';

/**
 * The platform's modal dialog: it traps focus, closes on Esc and makes the rest inert without a style sheet of its
 * own. Rarely right: use a panel unless the page must wait for the answer.
 */
export function Dialog({
  open,
  onClose,
  title,
  children,
  actions,
}: {
  open: boolean;
  onClose: () => void;
  title: string;
  children: ReactNode;
  actions?: ReactNode;
}) {
  const ref = useRef<HTMLDialogElement>(null);
  const titleId = useId();
  useEffect(() => {
    const dialog = ref.current;
    if (!dialog) return;
    if (open && !dialog.open) dialog.showModal();
    if (!open && dialog.open) dialog.close();
  }, [open]);
  return (
    <dialog
      ref={ref}
      aria-labelledby={titleId}
      onClose={onClose}
      className="m-auto w-full max-w-lg rounded-md border border-line-strong bg-paper p-0 text-ink backdrop:bg-ink/50"
    >
      <div className="flex items-start justify-between gap-4 px-5 pt-4">
        <h2 id={titleId} className="text-lg">
          {title}
        </h2>
        <IconButton label="Close" onClick={onClose}>
          <CrossIcon />
        </IconButton>
      </div>
      <div className="px-5 py-3">{children}</div>
      {actions && (
        <div className="flex flex-wrap justify-end gap-3 border-t border-line px-5 py-3">{actions}</div>
      )}
    </dialog>
  );
}
