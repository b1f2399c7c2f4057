'use client';

import { useCallback, useEffect, useRef, useState } from 'react';
import type { ErrorView } from '@/lib/domain/errors';
import type { ActionResult } from '@/lib/schemas/action-result';
import type { DemonstrationView, SaveDemonstrationInput } from '@/lib/schemas/demonstration';

export type Saving =
  | { readonly state: 'saved' | 'waiting' | 'saving' }
  | { readonly state: 'conflict'; readonly currentVersion: number }
  | { readonly state: 'failed'; readonly error: Pick<ErrorView, 'message' | 'fields' | 'incidentId'> };

export type SaveAction = (input: SaveDemonstrationInput) => Promise<ActionResult<{ version: number }>>;

/** After the last change, so that a drag is one save. */
const QUIET_MS = 700;

const LOST = { message: 'The server did not answer. Your changes are kept here and sent again when you change something or press “Save now”.' };

/**
 * Saves what is edited, one save at a time, each on the version the one before it made. A lost race stops it until the
 * writer decides: nothing of theirs and nothing of another's is thrown away behind anyone's back.
 */
export function useAutosave(demonstration: DemonstrationView, content: Pick<DemonstrationView, 'title' | 'scenes'>, save: SaveAction) {
  const [saving, setSaving] = useState<Saving>({ state: 'saved' });
  const [storedContent, setStoredContent] = useState(content);
  const [storedVersion, setStoredVersion] = useState(demonstration.version);
  const version = useRef(demonstration.version);
  const stored = useRef(content);
  const latest = useRef(content);
  const busy = useRef(false);
  const stopped = useRef(false);

  const send = useCallback(async () => {
    if (busy.current || stopped.current) return;
    busy.current = true;
    while (stored.current !== latest.current && !stopped.current) {
      const sent = latest.current;
      setSaving({ state: 'saving' });
      const result = await save({ id: demonstration.id, expectedVersion: version.current, title: sent.title, scenes: sent.scenes }).catch(() => null);
      if (result?.ok) {
        version.current = result.data.version;
        stored.current = sent;
        setStoredContent(sent);
        setStoredVersion(result.data.version);
        setSaving({ state: 'saved' });
        continue;
      }
      if (result?.error.code === 'conflict') {
        stopped.current = true;
        setSaving({ state: 'conflict', currentVersion: Number(result.error.details?.currentVersion) });
      } else setSaving({ state: 'failed', error: result?.error ?? LOST });
      break;
    }
    busy.current = false;
  }, [demonstration.id, save]);

  useEffect(() => {
    latest.current = content;
    if (stored.current === content) return;
    const timer = setTimeout(() => void send(), QUIET_MS);
    return () => clearTimeout(timer);
  }, [content, send]);

  // Closing the page before the last change is stored asks first.
  useEffect(() => {
    const ask = (event: BeforeUnloadEvent) => {
      if (stored.current !== latest.current) event.preventDefault();
    };
    window.addEventListener('beforeunload', ask);
    return () => window.removeEventListener('beforeunload', ask);
  }, []);

  const overwrite = (currentVersion: number) => {
    version.current = currentVersion;
    stopped.current = false;
    void send();
  };
  const shown: Saving = saving.state === 'saved' && storedContent !== content ? { state: 'waiting' } : saving;
  return { saving: shown, storedVersion, saveNow: () => void send(), overwrite };
}
