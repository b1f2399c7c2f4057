'use client';

import { cx } from '@/components/ui/class-names';
import { signed } from './compare-chart';
import type { ComparePoint } from './compare-points';

export interface PriceRow extends ComparePoint {
  readonly title: string;
  /** Scan time or breath-hold, now → then. */
  readonly timeWords: string;
  /** Not a remedy but what it is compared with. */
  readonly reference?: boolean;
}

const HALF = 100;

/** Price to the left, gain to the right of one line, on one scale: oversampling nobody needs is long on the left. */
export function PriceAndGain({
  rows,
  linkedKey,
  onLink,
}: {
  rows: readonly PriceRow[];
  linkedKey: string | null;
  onLink: (key: string | null) => void;
}) {
  const scale = Math.max(10, ...rows.flatMap(({ timePct, snrPct }) => [Math.abs(timePct), Math.abs(snrPct)]));
  return (
    <table className="w-full table-fixed text-sm">
      <caption className="mb-1 text-left text-ink-soft">
        The price in minutes lying still, where motion spoils pictures, against the gain in SNR.
      </caption>
      <thead>
        <tr className="text-ink-soft">
          <th scope="col" className="w-16 text-left font-medium">time</th>
          <th scope="col"><span className="sr-only">Price and gain</span></th>
          <th scope="col" className="w-16 text-right font-medium">SNR</th>
        </tr>
      </thead>
      {rows.map((row) => (
        <tbody
          key={row.key}
          onPointerEnter={() => onLink(row.reference ? null : row.key)}
          onPointerLeave={() => onLink(null)}
          className={cx(row.key === linkedKey && 'bg-wash')}
        >
          <tr>
            <th scope="rowgroup" colSpan={3} className="pt-1.5 text-left leading-tight font-medium">
              {row.title} <span className="figures font-normal whitespace-nowrap text-ink-soft">{row.timeWords}</span>
            </th>
          </tr>
          <tr>
            <td className="figures whitespace-nowrap">{signed(row.timePct)} %</td>
            <td>
              <Bars row={row} scale={scale} />
            </td>
            <td className="figures text-right whitespace-nowrap">{signed(row.snrPct)} %</td>
          </tr>
        </tbody>
      ))}
    </table>
  );
}

/** Widths are SVG attributes: the page's policy allows no style attributes. What is saved is drawn hollow. */
function Bars({ row, scale }: { row: PriceRow; scale: number }) {
  const length = (percent: number) => (Math.abs(percent) / scale) * HALF;
  const time = length(row.timePct);
  const snr = length(row.snrPct);
  return (
    <svg viewBox={`0 0 ${2 * HALF} 12`} preserveAspectRatio="none" aria-hidden="true" className="block h-3 w-full">
      <rect x={HALF - time} y={2} width={time} height={8} strokeWidth={1} className={row.timePct > 0 ? 'fill-ink-soft' : 'fill-none stroke-ink-soft'} />
      <rect x={HALF} y={2} width={snr} height={8} strokeWidth={1} className={row.snrPct > 0 ? 'fill-indigo' : 'fill-none stroke-indigo'} />
      <path d={`M${HALF} 0V12`} className="stroke-ink" strokeWidth={1} />
    </svg>
  );
}
