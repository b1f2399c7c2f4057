'use client';

import { useState, type RefObject } from 'react';
import { Button } from '@/components/ui/button';

function hand(blob: Blob, fileName: string): void {
  const address = URL.createObjectURL(blob);
  const link = document.createElement('a');
  link.href = address;
  link.download = fileName;
  link.click();
  // The browser has taken it by then.
  setTimeout(() => URL.revokeObjectURL(address), 60_000);
}

/** Saves what the stage shows now. The file's name is the scene's number and nothing else: it ends up in a downloads folder. */
export function SaveScene({ stage, number, title }: { stage: RefObject<HTMLElement | null>; number: number; title: string }) {
  const [busy, setBusy] = useState<'svg' | 'png' | null>(null);
  const [problem, setProblem] = useState(false);
  const save = async (kind: 'svg' | 'png') => {
    const picture = stage.current?.querySelector('[data-stage-picture]');
    if (!picture) return setProblem(true);
    setBusy(kind);
    setProblem(false);
    try {
      const { pngOf, standaloneSvg } = await import('./standalone-svg');
      const svg = await standaloneSvg(picture, title);
      hand(kind === 'svg' ? new Blob([svg.text], { type: 'image/svg+xml' }) : await pngOf(svg), `scene-${number}.${kind}`);
    } catch {
      setProblem(true);
    }
    setBusy(null);
  };
  return (
    <>
      <Button size="sm" pending={busy === 'svg'} pendingLabel="Saving …" onClick={() => void save('svg')}>Save as SVG</Button>
      <Button size="sm" pending={busy === 'png'} pendingLabel="Saving …" onClick={() => void save('png')}>Save as PNG</Button>
      {problem && <p role="alert" className="self-center text-sm">This browser could not make the picture. Print the page instead, or make the hand-out.</p>}
    </>
  );
}
