'use client';

import { useState } from 'react';
import { MadeFile } from '@/components/ui/made-file';
import { Select } from '@/components/ui/select';
import type { Paper } from '@/lib/domain/plan/sheet';

const PAPERS = [{ value: 'A4', label: 'A4' }, { value: 'Letter', label: 'Letter' }] as const;
const FAILED = 'The hand-out could not be made, or the demonstration changed meanwhile. Ask again.';

/** All scenes on paper. `version` is that of what is stored: a file made before the last change is not offered as its own. */
export function HandOut({ id, version }: { id: string; version: number }) {
  const [paper, setPaper] = useState<Paper>('A4');
  return (
    <section aria-labelledby="hand-out-heading" className="space-y-4">
      <h2 id="hand-out-heading" className="text-lg">Hand-out</h2>
      <p className="text-sm text-ink-soft">All scenes as PDF, one a page: picture, verdict and figures, without your notes. Black on white, for any printer.</p>
      <div className="flex flex-wrap items-end gap-3">
        <Select<Paper> label="Paper" value={paper} options={PAPERS} onChange={(event) => setPaper(event.target.value as Paper)} />
        <MadeFile key={`${paper}/${version}`} base={`/demonstrations/${id}/hand-outs`} body={{ paper }} fileName="hand-out.pdf" what={`hand-out as PDF, ${paper}`} failed={FAILED} />
      </div>
    </section>
  );
}
