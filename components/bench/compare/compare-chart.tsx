'use client';

import { useRef, type KeyboardEvent } from 'react';
import { cx } from '@/components/ui/class-names';
import { formatShort } from '@/lib/presentation/round';
import { axisOf } from './chart-axes';
import { frontOf, type ComparePoint } from './compare-points';

const WIDTH = 340;
const HEIGHT = 228;
const EDGE = { left: 46, right: 12, top: 28, bottom: 38 };

export const signed = (percent: number): string => {
  const text = formatShort(percent, 1);
  return percent > 0 && text !== '0' ? `+${text}` : text === '0' || text === '−0' ? '±0' : text;
};

/**
 * Time against SNR, one stitch for each remedy, the front as a thread: what lies under the thread is paid for without
 * gain. One stop for Tab; arrow keys walk the stitches from quick to slow, Enter tries one.
 */
export function CompareChart({
  points,
  titles,
  linkedKey,
  triedKey,
  onLink,
  onTry,
}: {
  points: readonly ComparePoint[];
  titles: ReadonlyMap<string, string>;
  linkedKey: string | null;
  triedKey: string | null;
  onLink: (key: string | null) => void;
  onTry: (key: string) => void;
}) {
  const chart = useRef<SVGSVGElement>(null);
  const time = axisOf(points.map(({ timePct }) => timePct));
  const snr = axisOf(points.map(({ snrPct }) => snrPct));
  const x = (value: number) => EDGE.left + ((value - time.low) / (time.high - time.low)) * (WIDTH - EDGE.left - EDGE.right);
  const y = (value: number) => HEIGHT - EDGE.bottom - ((value - snr.low) / (snr.high - snr.low)) * (HEIGHT - EDGE.top - EDGE.bottom);
  const inOrder = [...points].sort((a, b) => a.timePct - b.timePct || b.snrPct - a.snrPct);
  const stop = [linkedKey, triedKey].find((key) => inOrder.some((point) => point.key === key)) ?? inOrder[0]?.key;
  const steps = frontOf(points);

  const onKeyDown = (event: KeyboardEvent<SVGGElement>, key: string) => {
    const by = { ArrowRight: 1, ArrowUp: 1, ArrowLeft: -1, ArrowDown: -1 }[event.key];
    if (by !== undefined) {
      event.preventDefault();
      const next = inOrder[inOrder.findIndex((point) => point.key === key) + by];
      if (next) chart.current?.querySelector<SVGGElement>(`[data-point="${CSS.escape(next.key)}"]`)?.focus();
    } else if (event.key === 'Enter' || event.key === ' ') {
      event.preventDefault();
      onTry(key);
    }
  };
  return (
    <svg ref={chart} viewBox={`0 0 ${WIDTH} ${HEIGHT}`} role="group" aria-label="Remedies, scan time against SNR" className="w-full overflow-visible text-[13px]">
      {snr.ticks.map((tick) => (
        <g key={tick}>
          <path d={`M${EDGE.left} ${y(tick)}H${WIDTH - EDGE.right}`} className={tick === 0 ? 'stroke-line-strong' : 'stroke-line'} />
          <text x={EDGE.left - 6} y={y(tick) + 4} textAnchor="end" className="figures fill-ink-soft">{signed(tick)}</text>
        </g>
      ))}
      {time.ticks.map((tick) => (
        <g key={tick}>
          <path d={`M${x(tick)} ${EDGE.top}V${HEIGHT - EDGE.bottom}`} className={tick === 0 ? 'stroke-line-strong' : 'stroke-line'} />
          <text x={x(tick)} y={HEIGHT - EDGE.bottom + 15} textAnchor="middle" className="figures fill-ink-soft">{signed(tick)}</text>
        </g>
      ))}
      <text x={WIDTH - EDGE.right} y={HEIGHT - 5} textAnchor="end" className="fill-ink-soft">scan time, %</text>
      <text x={2} y={11} className="fill-ink-soft">SNR, %</text>
      {steps.length > 1 && (
        <path
          data-node="front"
          d={`M${steps.map((point) => `${x(point.timePct)} ${y(point.snrPct)}`).join('L')}`}
          className="fill-none stroke-indigo"
          strokeDasharray="1 4"
          strokeLinecap="round"
          strokeWidth={2}
        />
      )}
      <g data-node="now">
        <path d={`M${x(0) - 7} ${y(0)}h14M${x(0)} ${y(0) - 7}v14`} className="stroke-ink" strokeWidth={2.5} />
        <text x={x(0) - 9} y={y(0) - 6} textAnchor="end" className="fill-ink font-medium">now</text>
      </g>
      {inOrder.map((point) => (
        <Stitch
          key={point.key}
          point={point}
          at={[x(point.timePct), y(point.snrPct)]}
          title={titles.get(point.key) ?? point.key}
          linked={point.key === linkedKey}
          tried={point.key === triedKey}
          stop={point.key === stop}
          onLink={onLink}
          onTry={onTry}
          onKeyDown={onKeyDown}
        />
      ))}
    </svg>
  );
}

function Stitch({
  point,
  at: [x, y],
  title,
  linked,
  tried,
  stop,
  onLink,
  onTry,
  onKeyDown,
}: {
  point: ComparePoint;
  at: readonly [number, number];
  title: string;
  linked: boolean;
  tried: boolean;
  stop: boolean;
  onLink: (key: string | null) => void;
  onTry: (key: string) => void;
  onKeyDown: (event: KeyboardEvent<SVGGElement>, key: string) => void;
}) {
  const words = `${title}: time ${signed(point.timePct)} %, SNR ${signed(point.snrPct)} %${point.leavesFold ? ', leaves fold in the keep-clear area' : ''}`;
  const arm = linked || tried ? 6 : 4;
  return (
    <g
      role="button"
      tabIndex={stop ? 0 : -1}
      aria-label={words}
      aria-pressed={tried}
      data-point={point.key}
      onClick={() => onTry(point.key)}
      onKeyDown={(event) => onKeyDown(event, point.key)}
      onFocus={() => onLink(point.key)}
      onBlur={() => onLink(null)}
      onPointerEnter={() => onLink(point.key)}
      onPointerLeave={() => onLink(null)}
      className="cursor-pointer"
    >
      <title>{words}</title>
      <rect x={x - 12} y={y - 12} width={24} height={24} className={cx('fill-transparent', linked && 'fill-wash')} />
      <path
        d={`M${x - arm} ${y - arm}L${x + arm} ${y + arm}M${x - arm} ${y + arm}L${x + arm} ${y - arm}`}
        className={cx(point.leavesFold ? 'stroke-thread' : point.onFront || linked || tried ? 'stroke-indigo' : 'stroke-ink-soft')}
        strokeWidth={linked || tried ? 3 : point.onFront ? 2.25 : 1.25}
        strokeDasharray={point.leavesFold ? '3 2' : undefined}
      />
    </g>
  );
}
