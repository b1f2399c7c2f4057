import { keepClearWords } from '@/components/plan/sheet-words';
import { Fact, Facts } from '@/components/ui/figure';
import { KEEP_CLEAR_PRESETS } from '@/lib/domain/protocol/keep-clear-presets';
import { formatMoment } from '@/lib/presentation/moment';
import type { KeepClearRequestView } from '@/lib/schemas/keep-clear-request';

/** What was asked for, in words: a preset by its name, a typed box by its edges. */
export function requestedWords({ keepClearPreset, keepClear }: KeepClearRequestView): string {
  return KEEP_CLEAR_PRESETS.find(({ key }) => key === keepClearPreset)?.label ?? keepClearWords(keepClear);
}

export function RequestedArea({ requested }: { requested: KeepClearRequestView }) {
  return (
    <Facts>
      <Fact name="Area">{requestedWords(requested)}</Fact>
      <Fact name="Fold beside it">
        {requested.toleratedFoldOutsidePct === undefined ? (
          'as site policy tolerates it'
        ) : (
          <>
            tolerated up to <span className="figures">{requested.toleratedFoldOutsidePct}</span> % of the picture
          </>
        )}
      </Fact>
      {requested.note && <Fact name="About">{requested.note}</Fact>}
      <Fact name="Asked by">
        {requested.by}, {formatMoment(new Date(requested.at))}
      </Fact>
    </Facts>
  );
}
