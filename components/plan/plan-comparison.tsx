import { VerdictWords } from '@/components/bench/verdict-words';
import { Table, Td, Th, Tr } from '@/components/ui/table';
import type { Verdict } from '@/lib/physics/model/assessment';
import { formatMoment } from '@/lib/presentation/moment';
import type { PlanView } from '@/lib/schemas/plan';
import { comparePlans } from './plan-differences';

const heading = ({ version, savedAt, savedBy }: PlanView) => (
  <>
    Version <span className="figures">{version}</span>
    <span className="block text-sm font-normal">
      {formatMoment(new Date(savedAt))}, {savedBy}
    </span>
  </>
);

function VerdictCell({ verdict }: { verdict?: Verdict }) {
  return <Td>{verdict ? <VerdictWords verdict={verdict} /> : <span className="text-ink-soft">not in it</span>}</Td>;
}

/** Two versions side by side: every verdict, then only what changed. */
export function PlanComparison({ before, after }: { before: PlanView; after: PlanView }) {
  const { verdicts, parts } = comparePlans(before, after);
  return (
    <>
      <h2 className="mb-3 text-lg">Verdicts</h2>
      <Table caption="Verdict of each sequence in both versions">
        <thead>
          <tr>
            <Th>Sequence</Th>
            <Th>{heading(before)}</Th>
            <Th>{heading(after)}</Th>
          </tr>
        </thead>
        <tbody>
          {verdicts.map((each) => (
            <Tr key={each.id}>
              <Td className="font-semibold">{each.name}</Td>
              <VerdictCell verdict={each.before} />
              <VerdictCell verdict={each.after} />
            </Tr>
          ))}
        </tbody>
      </Table>
      <h2 className="mt-8 mb-3 text-lg">What changed</h2>
      {parts.length === 0 ? (
        <p className="text-ink-soft">Nothing: both versions hold the same values.</p>
      ) : (
        <Table caption="Fields that differ, before and after">
          <thead>
            <tr>
              <Th>Field</Th>
              <Th>Version {before.version}</Th>
              <Th>Version {after.version}</Th>
            </tr>
          </thead>
          {parts.map(({ key, name, fields }) => (
            <tbody key={key}>
              <tr>
                <th colSpan={3} scope="rowgroup" className="border-b border-line bg-sunk px-3 py-1.5 text-left text-sm font-semibold">
                  {name}
                </th>
              </tr>
              {fields.map((each) => (
                <Tr key={each.key}>
                  <Td>{each.field}</Td>
                  <Td className="figures">{each.before}</Td>
                  <Td className="figures font-semibold">{each.after}</Td>
                </Tr>
              ))}
            </tbody>
          ))}
        </Table>
      )}
    </>
  );
}
