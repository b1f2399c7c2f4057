import type { MoveView, PlaceView, Suggestions } from '@/lib/schemas/move-proposal';
import type { HistoryLine } from '@/lib/schemas/booking-entry';
import { dayKey, formatDay, formatMoment, formatTime } from '@/lib/presentation/moment';
import { placeText, type ShownLine } from './history-panel';
import type { ScannerPlaces } from './move-panel';
import type { PlaceWordsProps } from './place-words';

/** Moments become words on the server, so that every browser prints the same. */
export function placeWords({ scannerName, scheduledAt, slotMinutes }: PlaceView): PlaceWordsProps {
  const at = new Date(scheduledAt);
  return { scanner: scannerName, when: `${formatDay(at)}, ${formatTime(at)}`, slotMinutes };
}

export function scannerPlaces({ scanners }: Suggestions): ScannerPlaces[] {
  return scanners.map(({ starts, ...scanner }) => ({
    ...scanner,
    ...(starts ? {
      places: starts.map((start) => {
        const at = new Date(start);
        return { day: dayKey(at), time: formatTime(at), label: `${formatDay(at)} ${formatTime(at)}` };
      }),
    } : {}),
  }));
}

export function openMove(move: MoveView | null) {
  return move && { proposed: placeWords(move.proposed), booked: placeWords(move.booked), differs: move.differs, by: move.proposedBy };
}

export function shownLines(lines: readonly HistoryLine[]): ShownLine[] {
  const words = (place: NonNullable<NonNullable<HistoryLine['data']>['from']>) => {
    const at = new Date(place.at);
    return placeText(place, `${formatDay(at)}, ${formatTime(at)}`);
  };
  return lines.map((line) => ({
    ...line,
    shown: formatMoment(new Date(line.at)),
    ...(line.data?.from && line.data.to ? { from: words(line.data.from), to: words(line.data.to) } : {}),
  }));
}
