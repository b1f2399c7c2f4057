import type { ImportRow, ImportSettings } from '@/lib/domain/import';
import type { ImportDone, StagedRows } from '@/lib/schemas/import';

/** What a file's reader may ask of the server. */
export interface ImportServer {
  start(id: string, format: 'csv' | 'fhir', settings: ImportSettings): Promise<void>;
  stage(id: string, rows: readonly ImportRow[]): Promise<StagedRows>;
  commit(id: string, expectedRows: number): Promise<ImportDone>;
  cancel(id: string): Promise<void>;
}

async function post<T>(path: string, body: unknown): Promise<T> {
  const answer = await fetch(path, { method: 'POST', headers: { 'content-type': 'application/json' }, body: JSON.stringify(body) }).catch(() => {
    throw new Error('The server did not answer. Nothing was booked; try again shortly.');
  });
  if (answer.status === 204) return undefined as T;
  const said = (await answer.json().catch(() => ({}))) as { title?: string };
  if (!answer.ok) throw new Error(said.title ?? `The server answered ${answer.status}. Nothing was booked; try again.`);
  return said as T;
}

export const importServer: ImportServer = {
  start: (id, format, settings) => post('/api/v1/imports', { id, format, settings }),
  stage: (id, rows) => post(`/api/v1/imports/${id}/rows`, { rows }),
  commit: (id, expectedRows) => post(`/api/v1/imports/${id}/commit`, { expectedRows }),
  cancel: (id) => post(`/api/v1/imports/${id}/cancel`, {}),
};
