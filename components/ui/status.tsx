'use client';

import { createContext, useCallback, useContext, useEffect, useMemo, useState, type ReactNode } from 'react';
import { IconButton } from './button';
import { CrossIcon } from './icons';

interface StatusApi {
  /** Says a finished action aloud and shows it for a while. Never the only place an error appears. */
  say: (message: string) => void;
}

const StatusContext = createContext<StatusApi>({ say: () => {} });

export function useStatus(): StatusApi {
  return useContext(StatusContext);
}

// Long enough to read two short sentences twice; hovering or focusing the strip holds it (WCAG 2.2.1).
const SHOWN_MS = 8000;

export function StatusProvider({ children }: { children: ReactNode }) {
  const [message, setMessage] = useState<{ text: string; at: number } | null>(null);
  const [held, setHeld] = useState(false);
  const say = useCallback((text: string) => setMessage((last) => ({ text, at: (last?.at ?? 0) + 1 })), []);
  const api = useMemo(() => ({ say }), [say]);

  useEffect(() => {
    if (!message || held) return;
    const timer = setTimeout(() => setMessage(null), SHOWN_MS);
    return () => clearTimeout(timer);
  }, [message, held]);

  return (
    <StatusContext.Provider value={api}>
      {children}
      <div
        role="status"
        // In the corner that holds least: on the bench it lies over the ledger's cell that says the same.
        className="pointer-events-none fixed bottom-0 left-0 z-50 flex w-full max-w-md p-2 lg:max-w-78 print:hidden"
      >
        {message && (
          <div
            key={message.at}
            onMouseEnter={() => setHeld(true)}
            onMouseLeave={() => setHeld(false)}
            onFocus={() => setHeld(true)}
            onBlur={() => setHeld(false)}
            className="pointer-events-auto flex w-full items-center justify-between gap-3 rounded border border-ink bg-paper py-2 pr-2 pl-4 shadow-lg"
          >
            <span>{message.text}</span>
            <IconButton label="Dismiss" onClick={() => setMessage(null)}>
              <CrossIcon />
            </IconButton>
          </div>
        )}
      </div>
    </StatusContext.Provider>
  );
}
