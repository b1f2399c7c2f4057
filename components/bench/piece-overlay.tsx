'use client';

import { centroidOf } from '@/components/schematic/scene/rings';
import { toPixels, type Fit } from '@/components/schematic/scene/scene';
import type { ScreenPoint } from '@/components/schematic/scene/section-frame';
import { ringOnScreen } from '@/components/schematic/scene/section-scene';
import type { Prescription } from '@/lib/physics/model/prescription';
import type { SectionDrawing } from '@/lib/physics/section/section-drawing';
import { describeGhost, describePiece } from '@/lib/presentation/describe-section';
import { spreadPoints } from './spread-points';
import { usePlaced } from './use-placed';

/** Landed pieces can be focused, so that the thread to where they come from is not only for a mouse. */
export function PieceOverlay({
  drawing,
  prescription,
  fit,
  onFocus,
}: {
  drawing: SectionDrawing;
  prescription: Prescription;
  fit: Fit;
  onFocus: (name: string | undefined) => void;
}) {
  const toRing = ringOnScreen(drawing, prescription);
  const pieces = [
    ...drawing.pieces.map((piece) => ({ ...piece, words: describePiece(piece) })),
    ...drawing.ghosts.map((ghost) => ({ ...ghost, words: describeGhost(ghost) })),
  ];
  const seen = pieces.flatMap(({ name, landed, inKeepClear, words }) => {
    const at = centroidOf((inKeepClear.length > 0 ? inKeepClear : landed).map(toRing));
    return at ? [{ name, words, at: toPixels(fit, at) }] : [];
  });
  const places = spreadPoints(seen.map(({ at }) => at));
  return seen.map(({ name, words }, i) => <PieceButton key={name} name={name} words={words} at={places[i]!} onFocus={onFocus} />);
}

function PieceButton({
  name,
  words,
  at: [x, y],
  onFocus,
}: {
  name: string;
  words: string;
  at: ScreenPoint;
  onFocus: (name: string | undefined) => void;
}) {
  return (
    <button
      ref={usePlaced<HTMLButtonElement>(x, y)}
      type="button"
      data-piece={name}
      aria-label={words}
      onFocus={() => onFocus(name)}
      onBlur={() => onFocus(undefined)}
      onPointerEnter={() => onFocus(name)}
      onPointerLeave={() => onFocus(undefined)}
      className="absolute -m-3 size-6 rounded-full"
    />
  );
}
