import type { Assessment } from '@/lib/physics/model/assessment';
import type { Case } from '@/lib/physics/model/case';
import type { Ranking, Remedy } from '@/lib/physics/model/remedy';
import type { Answer } from '../live/results';
import { adoptRemedy } from '../state/adopt-remedy';
import { sequenceById, type BenchDocument, type BenchSetting } from '../state/bench-document';
import { caseOf } from '../state/case-of';

export interface BenchEngine {
  readonly rank: (question: Case) => Promise<Ranking>;
  readonly assessAll: (questions: readonly Case[]) => Promise<readonly Answer[]>;
}

export interface SolvedSequence {
  readonly id: string;
  readonly name: string;
  readonly before: Assessment;
  readonly after: Assessment;
  /** Absent: nothing on this scanner keeps its area free of fold. */
  readonly remedy?: Remedy;
}

export interface SolvedPlan {
  /** What was solved; another document on the bench makes the proposal stale. */
  readonly from: BenchDocument;
  readonly document: BenchDocument;
  /** Those that fold in the keep-clear area, and those that raising the arms changed. */
  readonly sequences: readonly SolvedSequence[];
  readonly armsRaised: boolean;
  /** Scan time of all sequences together, s. */
  readonly beforeS: number;
  readonly afterS: number;
}

interface Watch {
  readonly onProgress: (done: number, total: number) => void;
  readonly stopped: () => boolean;
}

const frees = ({ assessment }: Remedy): boolean =>
  assessment.verdict === 'no-fold-expected' || assessment.verdict === 'fold-outside-keep-clear';

const scanS = (answers: readonly Answer[]): number => answers.reduce((sum, { assessment }) => sum + (assessment?.time?.scanS ?? 0), 0);

function assessAll(document: BenchDocument, setting: BenchSetting, engine: BenchEngine): Promise<readonly Answer[]> {
  return engine.assessAll(document.sequences.map((sequence) => caseOf(document, setting, sequence)));
}

/** One pass over what folds; ends early with the first remedy that moves the arms, which every sequence shares. */
async function solveOnce(
  start: BenchDocument,
  setting: BenchSetting,
  engine: BenchEngine,
  { onProgress, stopped }: Watch,
): Promise<{ document: BenchDocument; remedies: Map<string, Remedy>; arms?: { id: string; remedy: Remedy } } | null> {
  const answers = await assessAll(start, setting, engine);
  const folding = start.sequences.filter((_, i) => answers[i]?.assessment?.verdict === 'fold-in-keep-clear');
  const remedies = new Map<string, Remedy>();
  let document = start;
  for (const [done, { id }] of folding.entries()) {
    if (stopped()) return null;
    onProgress(done, folding.length);
    const ranking = await engine.rank(caseOf(document, setting, sequenceById(document, id)));
    const remedy = ranking.remedies.find(frees);
    if (!remedy) continue;
    if (remedy.arms !== document.patient.arms.position) return { document, remedies, arms: { id, remedy } };
    document = adoptRemedy(document, id, remedy);
    remedies.set(id, remedy);
  }
  return { document, remedies };
}

/**
 * The cheapest remedy for each sequence that folds in the keep-clear area. When one of them raises the arms, the others
 * are solved anew with raised arms, so that none pays for what that has solved already. Null when it was stopped.
 */
export async function solveAll(from: BenchDocument, setting: BenchSetting, engine: BenchEngine, watch: Watch): Promise<SolvedPlan | null> {
  let solved = await solveOnce(from, setting, engine, watch);
  if (solved?.arms) {
    const { id, remedy } = solved.arms;
    solved = await solveOnce(adoptRemedy(from, id, remedy), setting, engine, watch);
    solved?.remedies.set(id, remedy);
  }
  if (!solved || watch.stopped()) return null;
  const { document, remedies } = solved;
  const [before, after] = [await assessAll(from, setting, engine), await assessAll(document, setting, engine)];
  const sequences = document.sequences.flatMap(({ id, prescription }, i): SolvedSequence[] => {
    const [was, is] = [before[i]?.assessment, after[i]?.assessment];
    if (!was || !is) return [];
    const remedy = remedies.get(id);
    const touched = remedy !== undefined || was.verdict === 'fold-in-keep-clear' || was.verdict !== is.verdict;
    return touched ? [{ id, name: prescription.name, before: was, after: is, ...(remedy ? { remedy } : {}) }] : [];
  });
  return {
    from,
    document,
    sequences,
    armsRaised: document.patient.arms.position !== from.patient.arms.position,
    beforeS: scanS(before),
    afterS: scanS(after),
  };
}
