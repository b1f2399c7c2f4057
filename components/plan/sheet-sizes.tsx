import type { PlanView } from '@/lib/schemas/plan';
import { restRows, SHEET_TITLES, sizeRows } from './sheet-words';

/** What the plan rests on: every size with how it was got, the arms, the keep-clear area, how sure. */
export function SheetSizes({ plan }: { plan: PlanView }) {
  return (
    <div className="sheet-small text-sm">
      <table className="w-full border-collapse text-left">
        <caption className="text-left font-semibold">{SHEET_TITLES.sizes}</caption>
        <tbody>
          {sizeRows(plan).map((each) => (
            <tr key={each.name} className="border-b border-line align-top">
              <th scope="row" className="py-0.5 pr-2 font-normal">{each.name}</th>
              <td className="figures py-0.5 pr-2 whitespace-nowrap">{each.value}</td>
              <td className="py-0.5">{each.source}</td>
            </tr>
          ))}
        </tbody>
      </table>
      <p className="mt-2">
        {restRows(plan).map(([name, words]) => (
          <span key={name}>
            <strong className="font-semibold">{name}</strong> {words}{' '}
          </span>
        ))}
      </p>
    </div>
  );
}
