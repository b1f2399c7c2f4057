import { VerdictWords } from '@/components/bench/verdict-words';
import type { Verdict } from '@/lib/physics/model/assessment';

/** The worst verdict of a booking's sequences, or what keeps one from being worked out. */
export function BookingVerdict({ verdict }: { verdict?: Verdict }) {
  return verdict ? <VerdictWords verdict={verdict} /> : <span className="text-ink-soft">Sizes needed</span>;
}
