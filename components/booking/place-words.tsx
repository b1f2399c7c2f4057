import { Figure } from '@/components/ui/figure';

export interface PlaceWordsProps {
  readonly scanner: string;
  readonly when: string;
  readonly slotMinutes: number;
}

/** A place in the diary. */
export function PlaceWords({ scanner, when, slotMinutes }: PlaceWordsProps) {
  return (
    <span>
      {scanner}, <span className="figures whitespace-nowrap">{when}</span>, <Figure value={slotMinutes} unit="min" />
    </span>
  );
}
