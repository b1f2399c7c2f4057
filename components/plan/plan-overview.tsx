import { Fact, Facts } from '@/components/ui/figure';
import { Notice } from '@/components/ui/notice';
import { Table, Td, Th, Tr } from '@/components/ui/table';
import { VerdictWords } from '@/components/bench/verdict-words';
import { formatMoment } from '@/lib/presentation/moment';
import type { PlanView } from '@/lib/schemas/plan';
import { sheetSequence } from './sheet-facts';

/** What the plan says for each sequence, and where it stands. */
export function PlanOverview({ plan }: { plan: PlanView }) {
  const rows = plan.sequences.map((sequence, i) => sheetSequence(sequence, plan.results[i]!, plan));
  return (
    <>
      <Table caption="Sequences of the plan">
        {/* On a phone each row stacks: nobody scrolls sideways for a verdict. */}
        <thead className="max-sm:sr-only">
          <tr>
            <Th>Sequence</Th>
            <Th>Scanner takes</Th>
            <Th>Time</Th>
            <Th>Verdict</Th>
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <Tr key={row.id} className="max-sm:grid max-sm:grid-cols-2 max-sm:py-1">
              <Td className="max-sm:col-span-2">
                <span className="font-semibold">{row.name}</span>
                <span className="block text-sm text-ink-soft">{row.geometry}</span>
                {row.adopted.map((sentence) => (
                  <span key={sentence} className="block text-sm">
                    Adopted: {sentence}
                  </span>
                ))}
              </Td>
              <Td className="figures max-sm:pl-4">
                {row.slice ? `phase ${row.phase.value}, slice ${row.slice.value}` : row.phase.value}
                <span className="block text-sm text-ink-soft">{row.phase.note}</span>
              </Td>
              <Td className="figures">{row.time}</Td>
              <Td className="max-sm:col-span-2 max-sm:pl-4">
                <VerdictWords verdict={row.verdict} />
              </Td>
            </Tr>
          ))}
        </tbody>
      </Table>
      <Facts className="mt-5">
        <Fact name="Scanner">{plan.scanner.name}</Fact>
        <Fact name="Saved">
          {formatMoment(new Date(plan.savedAt))} by {plan.savedBy}
        </Fact>
        <Fact name="Sign-off">
          {plan.signOff
            ? `${plan.signOff.decision} by ${plan.signOff.by}, ${formatMoment(new Date(plan.signOff.at))}${plan.signOff.reason ? `: ${plan.signOff.reason}` : ''}`
            : plan.needsSignOff
              ? 'needed from a radiologist'
              : 'not needed'}
        </Fact>
        <Fact name="Rests on">
          policy version {plan.policy.version}, engine {plan.engineVersion}
        </Fact>
      </Facts>
      {plan.differences.length > 0 && (
        <Notice className="mt-4" title="The server’s answer differed from the bench’s when this was saved; the server’s is stored.">
          <ul>
            {plan.differences.map(({ sequence, field, bench, server }) => (
              <li key={`${sequence}/${field}`}>
                {sequence || 'All sequences'}, {field === 'scanS' ? 'scan time' : field}: bench {bench}, server {server}
              </li>
            ))}
          </ul>
        </Notice>
      )}
    </>
  );
}
