'use client';

import { memo, useDeferredValue, useState } from 'react';
import { Checkbox } from '@/components/ui/choice';
import { Popover } from '@/components/ui/popover';
import { Button } from '@/components/ui/button';
import type { Ranking, Remedy } from '@/lib/physics/model/remedy';
import { useActiveResult, useActiveSequence, useBenchState } from './bench-context';
import { listedFirst } from './compare/compare-points';
import { CompareRemedies } from './compare/compare-remedies';
import { presentRanking, type Ranked } from './live/results';
import { NotPossible } from './not-possible';
import { RemedyCard } from './remedy-card';
import { useToggleTrial } from './use-toggle-trial';

/** Ranked remedies for the sequence on the bench. Selecting one is trying it. */
export function RemediesPanel() {
  const result = useActiveResult();
  const { id } = useActiveSequence();
  const present = presentRanking(result);
  // While a handle is dragged rankings follow one another: the list waits for the picture, never the other way round.
  const ranked = useDeferredValue(result.ranked);
  return (
    <section aria-labelledby="remedies-title" className="flex min-h-0 flex-1 flex-col">
      <div className="flex items-baseline justify-between gap-4 border-b border-line px-4 py-2.5">
        <h2 id="remedies-title" tabIndex={-1} className="text-sm font-semibold tracking-wider text-ink-soft uppercase">
          Remedies
        </h2>
        <CostPoints />
      </div>
      <div className="relative min-h-0 flex-1 overflow-y-auto">
        {result.refusal ? (
          <p className="px-4 py-3 text-ink-soft">Remedies follow as soon as every value is allowed.</p>
        ) : ranked ? (
          <div aria-busy={!present}>
            <RankedList key={id} ranked={ranked} />
          </div>
        ) : (
          <p className="px-4 py-3 text-ink-soft">Working out the remedies.</p>
        )}
      </div>
    </section>
  );
}

const RankedList = memo(function RankedList({ ranked: { ranking, question } }: { ranked: Ranked }) {
  const [showAll, setShowAll] = useState(false);
  const [keepHold, setKeepHold] = useState(false);
  const [keepVoxel, setKeepVoxel] = useState(false);
  const [linkedKey, setLinkedKey] = useState<string | null>(null);
  const toggleTrial = useToggleTrial();
  const triedKey = useBenchState((state) => state.trial?.remedy.key ?? null);
  const { now, remedies, notPossible } = ranking;
  const wanted = remedies.filter((remedy) => (!keepHold || keepsHold(remedy, now)) && (!keepVoxel || keepsVoxel(remedy, now)));
  const shown = showAll ? wanted : listedFirst(wanted, triedKey);
  const hidden = wanted.length - shown.length;
  const filters = remedies.length > 1;
  return (
    <>
      {filters && (
        <div className="flex flex-wrap gap-x-5 border-b border-line px-4 py-1 text-sm">
          <Checkbox label="Keep the breath-hold" checked={keepHold} onChange={(event) => setKeepHold(event.target.checked)} />
          <Checkbox label="Keep the voxel" checked={keepVoxel} onChange={(event) => setKeepVoxel(event.target.checked)} />
        </div>
      )}
      {shown.length === 0 && <EmptyRanking ranking={ranking} filtered={wanted.length < remedies.length} />}
      {showAll && wanted.length > 1 && (
        <CompareRemedies remedies={wanted} {...{ now, linkedKey, triedKey }} onLink={setLinkedKey} onTry={toggleTrial} />
      )}
      <ol aria-label="Ranked remedies">
        {shown.map((remedy) => (
          <RemedyCard
            key={remedy.key}
            remedy={remedy}
            now={now}
            present={question.prescription}
            tried={remedy.key === triedKey}
            linked={showAll && remedy.key === linkedKey}
            onLink={showAll ? setLinkedKey : undefined}
            scale={scaleOf(shown)}
          />
        ))}
      </ol>
      {(hidden > 0 || showAll) && (
        <div className="px-4 py-3">
          <Button variant="quiet" size="sm" aria-expanded={showAll} onClick={() => setShowAll(!showAll)}>
            {showAll ? 'Show only the best' : `Show all: ${hidden} more, each beaten by one above or leaving more fold`}
          </Button>
        </div>
      )}
      {notPossible.length > 0 && <NotPossible items={notPossible} />}
    </>
  );
});

function EmptyRanking({ ranking, filtered }: { ranking: Ranking; filtered: boolean }) {
  const words = filtered
    ? 'No remedy keeps what is ticked above.'
    : ranking.now.verdict === 'no-fold-expected'
      ? 'No remedy is needed: no fold is expected.'
      : ranking.now.verdict === 'not-modelled'
        ? 'Nothing can be worked out for this kind of sampling.'
        : 'No single change or pair of changes is enough on this scanner.';
  return <p className="px-4 py-4 text-ink-soft">{words}</p>;
}

/** Longest bar shown; the first few remedies must stay apart though a swap may cost ten times as much. */
function scaleOf(remedies: readonly Remedy[]): number {
  return Math.max(100, ...remedies.slice(0, 6).map(({ costTenths }) => costTenths));
}

function keepsHold(remedy: Remedy, now: Ranking['now']): boolean {
  const before = now.time?.longestHoldS ?? 0;
  const after = remedy.assessment.time;
  return (after?.longestHoldS ?? 0) <= before + 0.05 && (after?.breathHolds ?? 0) <= (now.time?.breathHolds ?? 0);
}

function keepsVoxel(remedy: Remedy, now: Ranking['now']): boolean {
  const volume = (voxel: readonly number[] | undefined): number => (voxel ?? [1]).reduce((a, b) => a * b, 1);
  return volume(remedy.assessment.detail?.voxelMm) <= volume(now.detail?.voxelMm) * 1.001;
}

function CostPoints() {
  return (
    <Popover align="end" label="Cost points" trigger={<Button variant="quiet" size="sm">cost points</Button>}>
      <p className="text-sm">
        One point is as bad as 1 % more scan time. Time, lost SNR, a larger voxel, breath-hold beyond the limit, side
        effects, effort and leftover fold all count in it; the weights are site policy.
      </p>
    </Popover>
  );
}
