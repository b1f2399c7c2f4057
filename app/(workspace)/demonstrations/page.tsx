import type { Metadata } from 'next';
import { DemonstrationList, PutAwayList } from '@/components/demonstration/list/demonstration-list';
import { ImportFile } from '@/components/demonstration/list/import-file';
import { NewDemonstration } from '@/components/demonstration/list/new-demonstration';
import { SetPieceList } from '@/components/demonstration/list/set-piece-list';
import { EmptyState, PageBody, PageHeader } from '@/components/ui/page';
import { mayAttempt } from '@/lib/domain/access';
import { SET_PIECES } from '@/lib/domain/demonstration/set-pieces';
import { loadPage } from '@/lib/http/load-page';
import { listDemonstrations } from '@/lib/services/demonstration/list-demonstrations';
import { createDemonstrationAction, duplicateDemonstrationAction, importDemonstrationAction, putAwayDemonstrationAction } from './actions';

export const metadata: Metadata = { title: 'Demonstrations' };

export default async function DemonstrationsPage() {
  const { lines, away, mayEdit } = await loadPage(async (context) => {
    const mayEdit = mayAttempt(context.actor, 'demonstration.edit');
    const [lines, away] = await Promise.all([listDemonstrations(context), mayEdit ? listDemonstrations(context, { putAway: true }) : []]);
    return { lines, away, mayEdit };
  });
  const actions = { duplicate: duplicateDemonstrationAction, putAway: putAwayDemonstrationAction };
  const pieces = SET_PIECES.map(({ key, title, lead }) => ({ key, title, lead }));
  return (
    <PageBody>
      <PageHeader title="Demonstrations" lead="Scenes of wrap and what keeps it out, to show to a room or to send as a link." />
      {lines.length > 0 ? (
        <DemonstrationList lines={lines} mayEdit={mayEdit} actions={actions} />
      ) : (
        <EmptyState title="No demonstration yet">
          {mayEdit ? 'Copy a set piece below, or begin with a title of your own.' : 'Educators and leads build them; they appear here.'}
        </EmptyState>
      )}
      {mayEdit && (
        <>
          <PutAwayList lines={away} actions={actions} />
          <h2 className="mt-10 mb-3 text-xl">A new one</h2>
          <NewDemonstration create={createDemonstrationAction} />
          <h2 className="mt-10 mb-3 text-xl">Set pieces to copy</h2>
          <SetPieceList pieces={pieces} create={createDemonstrationAction} />
          <h2 className="mt-10 mb-3 text-xl">From another site</h2>
          <ImportFile bringIn={importDemonstrationAction} />
        </>
      )}
    </PageBody>
  );
}
