/** Small drawings of where the tape goes: an outline, the place in indigo. No measure is readable in them. */
function Frame({ title, children }: { title: string; children: React.ReactNode }) {
  return (
    <svg viewBox="0 0 120 150" role="img" aria-label={title} className="h-40 w-32 flex-none rounded border border-line bg-cloth text-ink">
      {children}
    </svg>
  );
}
const line = { fill: 'none', stroke: 'currentColor', strokeWidth: 2, strokeLinecap: 'round' as const, strokeLinejoin: 'round' as const };

/** From the front: the tape lies on top of the hip bones, level all the way round. */
export function TapeAtHipBones() {
  return (
    <Frame title="A body from the front. The tape goes round at the top of the hip bones, level all the way.">
      <path {...line} d="M60 10a11 11 0 1 1 0 22a11 11 0 1 1 0-22M52 33c-18 4-26 10-28 26l-4 34M68 33c18 4 26 10 28 26l4 34M38 56c-3 22-8 30-8 44c0 14 4 30 5 46M82 56c3 22 8 30 8 44c0 14-4 30-5 46M60 122v24" />
      <path {...line} strokeWidth={1.5} strokeDasharray="2 4" d="M40 92c6-6 12-8 16-2M80 92c-6-6-12-8-16-2" />
      <g className="text-indigo">
        <path {...line} strokeWidth={5} d="M31 92c16 7 42 7 58 0" />
        <path {...line} d="M102 78l-10 10M92 88h7M92 88v-7" />
      </g>
    </Frame>
  );
}

/** From the side, lying: from the couch to the highest point of the belly, straight up. */
export function DepthLying() {
  return (
    <Frame title="A body lying on its back, from the side. The depth goes straight up from the couch to the highest point of the belly.">
      <path {...line} d="M6 112h108" />
      <path {...line} d="M24 88a10 10 0 1 1 0 20a10 10 0 1 1 0-20M36 100c8-10 12-34 32-34c18 0 20 22 28 30l16 6M36 110h76" />
      <g className="text-indigo">
        <path {...line} strokeWidth={3} d="M68 66v46" />
        <path {...line} strokeWidth={3} d="M54 62h28" />
        <path {...line} d="M64 72l4-5l4 5M64 106l4 5l4-5" />
      </g>
    </Frame>
  );
}
