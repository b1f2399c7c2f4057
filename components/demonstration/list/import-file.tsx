'use client';

import { useRouter } from 'next/navigation';
import { useId, useState } from 'react';
import { Notice } from '@/components/ui/notice';
import type { ErrorView } from '@/lib/domain/errors';
import type { ActionResult } from '@/lib/schemas/action-result';

/** Scenes from another site's file; a value that is not allowed is named and nothing is stored. */
export function ImportFile({ bringIn }: { bringIn: (input: { text: string }) => Promise<ActionResult<{ id: string }>> }) {
  const router = useRouter();
  const id = useId();
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<Pick<ErrorView, 'message' | 'fields'> | null>(null);
  const read = async (file: File) => {
    setBusy(true);
    setProblem(null);
    const result = await file.text().then((text) => bringIn({ text })).catch(() => null);
    setBusy(false);
    if (result?.ok) return router.push(`/demonstrations/${result.data.id}`);
    setProblem(result?.error ?? { message: 'The file could not be read or is larger than 900 kB; allowed: up to 40 scenes.' });
  };
  return (
    <div className="space-y-3">
      <label htmlFor={id} className="block text-sm font-semibold">File of scenes (JSON) from another demonstration</label>
      <input
        id={id}
        type="file"
        accept="application/json,.json"
        disabled={busy}
        onChange={(event) => {
          const file = event.target.files?.[0];
          if (file) void read(file);
          event.target.value = '';
        }}
        className="block w-full max-w-md rounded border border-line-strong bg-paper p-2 file:mr-3 file:rounded file:border-0 file:bg-sunk file:px-3 file:py-1 file:font-semibold file:text-ink"
      />
      {busy && <p role="status">Reading …</p>}
      {problem && (
        <Notice tone="error" live title={problem.message}>
          {Object.entries(problem.fields ?? {}).slice(0, 6).map(([field, text]) => (
            <p key={field}>{field === 'text' ? text : `${field}: ${text}`}</p>
          ))}
        </Notice>
      )}
    </div>
  );
}
