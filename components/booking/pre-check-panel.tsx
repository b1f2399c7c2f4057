import { VerdictWords } from '@/components/bench/verdict-words';
import { LinkButton } from '@/components/ui/button';
import { Fact, Facts, Figure } from '@/components/ui/figure';
import { Panel } from '@/components/ui/panel';
import { Table, Td, Th, Tr } from '@/components/ui/table';
import type { Finding, Load } from '@/lib/domain/pre-check/result';
import { PLANNING_ESTIMATE, RESULT_WORDS, shareWords } from '@/lib/presentation/pre-check-words';
import type { PreCheckView } from '@/lib/schemas/pre-check';
import { ResultWords } from './result-words';

function LoadFigure({ load, unit }: { load?: Load; unit: string }) {
  if (!load) return <span className="text-ink-soft">not known</span>;
  return (
    <>
      <Figure value={load.value} unit={unit} /> of <Figure value={load.limit} unit={unit} />
      <span className="text-sm text-ink-soft">{load.measured ? ' · measured' : ' · not measured'}</span>
    </>
  );
}

function Limits({ check }: { check: PreCheckView }) {
  const { booked } = check;
  return (
    <Facts>
      <Fact name="Table load"><LoadFigure load={booked.table} unit="kg" /></Fact>
      <Fact name="Clearance in the opening">
        {booked.opening
          ? <><Figure value={`${booked.opening.clearanceMm} ± ${booked.opening.spreadMm}`} unit="mm" /> <span className="text-sm text-ink-soft">at the {booked.opening.section}</span></>
          : <span className="text-ink-soft">not known</span>}
      </Fact>
      <Fact name="Largest FOV"><LoadFigure load={booked.largestFov} unit="mm" /></Fact>
      <Fact name="Minutes">
        {check.minutesNeeded > 0
          ? <><Figure value={check.minutesNeeded} unit="min" /> <span className="text-sm text-ink-soft">scan and set-up{check.minutesOver > 0 ? `, ${check.minutesOver} over the slot` : ', within the slot'}</span></>
          : <span className="text-ink-soft">not known</span>}
      </Fact>
    </Facts>
  );
}

/** Reasons under the result each of them alone would call for, worst first. */
function Reasons({ findings }: { findings: readonly Finding[] }) {
  if (findings.length === 0) return <p>Nothing found that speaks against it.</p>;
  const calls = [...new Set(findings.map((finding) => finding.calls))];
  return (
    <dl className="space-y-3">
      {calls.map((one) => (
        <div key={one}>
          <dt className="text-sm font-semibold text-ink-soft">{RESULT_WORDS[one]}</dt>
          <dd>
            <ul className="list-disc space-y-1 pl-5">
              {findings.filter((finding) => finding.calls === one).map(({ text }) => <li key={text}>{text}</li>)}
            </ul>
          </dd>
        </div>
      ))}
    </dl>
  );
}

function Sequences({ check }: { check: PreCheckView }) {
  const { sequences } = check.booked;
  if (sequences.length === 0) return null;
  return (
    <Table caption="Sequences of the pre-check">
      <thead>
        <tr><Th>Sequence</Th><Th>Verdict</Th><Th className="text-right">Fold in the keep-clear area</Th><Th className="text-right">Scan</Th></tr>
      </thead>
      <tbody>
        {sequences.map(({ name, verdict, foldProbability, scanMinutes }) => (
          <Tr key={name}>
            <Td>{name}</Td>
            <Td><VerdictWords verdict={verdict} /></Td>
            <Td className="text-right">
              {foldProbability === undefined ? <span className="text-ink-soft">not worked out</span> : <Figure value={shareWords(foldProbability)} unit="of such patients" />}
            </Td>
            <Td className="text-right"><Figure value={scanMinutes.toFixed(1)} unit="min" /></Td>
          </Tr>
        ))}
      </tbody>
    </Table>
  );
}

/** What the last pre-check came to, why, and the one thing to do. */
export function PreCheckPanel({ check, checkedAt, next, here }: {
  check: PreCheckView | null;
  checkedAt: string;
  next?: { label: string; href: string };
  /** The page's own address: what leads only here is somebody else's to do. */
  here: string;
}) {
  if (!check) {
    return <Panel title="Pre-check" aside={<ResultWords />}><p>The first check is on its way; it runs in the background. Look again shortly.</p></Panel>;
  }
  return (
    <Panel title="Pre-check" aside={<ResultWords result={check.result} stale={check.stale} />}>
      <div className="space-y-5">
        <Reasons findings={check.findings} />
        {next?.href === here && <p>A radiographer plans it. Sizes, another place, a note and a question to a lead can be seen to from here.</p>}
        {next && next.href !== here && (
          <p className="flex flex-wrap items-center gap-3">
            <LinkButton href={next.href} variant="primary">{next.label}</LinkButton>
            {next.label !== check.next.text && <span className="text-ink-soft">{check.next.text}</span>}
          </p>
        )}
        <Limits check={check} />
        <Sequences check={check} />
        <p className="text-sm text-ink-soft">
          {PLANNING_ESTIMATE} Fold probabilities are without margin; verdicts with it. Checked {checkedAt}. Based on: {check.basis.join(' · ')}.
        </p>
      </div>
    </Panel>
  );
}
