import { Path, Svg } from '@react-pdf/renderer';
import { VERDICT_MARKS } from '@/components/bench/verdict-words';
import { MARK_PATHS } from '@/components/ui/marks';
import type { Verdict } from '@/lib/physics/model/assessment';

/** The mark of a verdict as it is on the screen, in black. */
export function VerdictMark({ verdict, size }: { verdict: Verdict; size: number }) {
  const { edge, fill, thread, dashed } = MARK_PATHS[VERDICT_MARKS[verdict]];
  return (
    <Svg viewBox="0 0 20 20" style={{ width: size, height: size, marginRight: 3 }}>
      <Path d={edge} fill="none" stroke="black" strokeWidth={1.75} {...(dashed ? { strokeDasharray: '2.5 2' } : {})} />
      {fill ? <Path d={fill} fill="black" /> : null}
      {thread ? <Path d={thread} fill="none" stroke="black" strokeWidth={1.25} /> : null}
    </Svg>
  );
}
