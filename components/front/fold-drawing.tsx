import { useId } from 'react';
import { EXAMPLE, type WorkedFold } from './worked-fold';

const { halfBreadthMm: a, halfDepthMm: b, fovMm, keepClear } = EXAMPLE;
const HALF_FOV = fovMm / 2;
const HALF_READOUT = 250;
const REACH = 285;

/** A woven edge across the picture: double line with ticks, its body outside the acquired width. */
function WovenEdge({ yMm, outward, pattern }: { yMm: number; outward: 1 | -1; pattern: string }) {
  const top = outward < 0 ? yMm - 5 : yMm;
  return (
    <g>
      <rect x={-REACH} y={top} width={2 * REACH} height={5} fill={`url(#${pattern})`} />
      <path d={`M${-REACH} ${yMm} H${REACH}`} className="stroke-ink" strokeWidth="1.5" />
      <path d={`M${-REACH} ${yMm + outward * 5} H${REACH}`} className="stroke-ink" strokeWidth="0.75" />
    </g>
  );
}

/** A hatched copy of the body moved by one acquired width, cut to the picture. */
function Landed({ byMm, clip, hatch, edge }: { byMm: number; clip: string; hatch: string; edge: string }) {
  return (
    <g clipPath={`url(#${clip})`}>
      <ellipse cx="0" cy={byMm} rx={a} ry={b} fill={`url(#${hatch})`} />
      <ellipse cx="0" cy={byMm} rx={a} ry={b} fill="none" className={edge} strokeWidth="1.5" />
    </g>
  );
}

/** Axial section, patient's left on the right. Every position follows from the numbers of `worked`. */
export function FoldDrawing({ worked, description }: { worked: WorkedFold; description: string }) {
  const id = useId();
  const half = worked.widthMm / 2;
  const name = (part: string) => `${id}${part}`;
  return (
    <svg
      viewBox="-318 -222 636 444"
      role="img"
      aria-label={description}
      className="block h-auto w-full select-none"
    >
      <defs>
        <pattern id={name('ticks')} width="6" height="5" patternUnits="userSpaceOnUse">
          <path d="M0 5 L4 0" className="stroke-ink" strokeWidth="0.75" />
        </pattern>
        <pattern id={name('ochre')} width="7" height="7" patternUnits="userSpaceOnUse">
          <rect width="7" height="7" className="fill-ochre-wash" />
          <path d="M-1 8 L8 -1 M-1 1 L1 -1 M6 8 L8 6" className="stroke-ochre" strokeWidth="1.1" />
        </pattern>
        <pattern id={name('thread')} width="7" height="7" patternUnits="userSpaceOnUse">
          <rect width="7" height="7" className="fill-thread-wash" />
          <path d="M-1 -1 L8 8 M-1 6 L1 8 M6 -1 L8 1" className="stroke-thread" strokeWidth="1.4" />
        </pattern>
        <clipPath id={name('picture')}>
          <rect x={-HALF_READOUT} y={-HALF_FOV} width={2 * HALF_READOUT} height={fovMm} />
        </clipPath>
        <clipPath id={name('area')}>
          <rect
            x={keepClear.fromXMm}
            y={keepClear.anteriorMm}
            width={keepClear.toXMm - keepClear.fromXMm}
            height={keepClear.posteriorMm - keepClear.anteriorMm}
          />
        </clipPath>
      </defs>

      <rect x={-HALF_READOUT} y={-HALF_FOV} width={2 * HALF_READOUT} height={fovMm} className="fill-paper" />
      <g clipPath={`url(#${name('picture')})`}>
        <ellipse rx={a} ry={b} className="fill-tissue-fat" />
        <ellipse cy="12" rx={a * 0.83} ry={b * 0.82} className="fill-tissue-lean" />
        <ellipse cx="-78" cy="-28" rx="96" ry="74" className="fill-tissue-organ" />
        <ellipse cx="112" cy="-6" rx="34" ry="44" className="fill-tissue-gland" />
        <ellipse cx="-92" cy="62" rx="26" ry="34" className="fill-tissue-gland" />
        <ellipse cx="84" cy="66" rx="26" ry="34" className="fill-tissue-gland" />
        <ellipse cy="84" rx="32" ry="27" className="fill-tissue-bone" />
      </g>
      <ellipse rx={a} ry={b} fill="none" className="stroke-ink-soft" strokeWidth="1.25" />

      {half < b && (
        <>
          <Landed byMm={worked.widthMm} clip={name('picture')} hatch={name('ochre')} edge="stroke-ochre" />
          <Landed byMm={-worked.widthMm} clip={name('picture')} hatch={name('ochre')} edge="stroke-ochre" />
          <Landed byMm={-worked.widthMm} clip={name('area')} hatch={name('thread')} edge="stroke-thread" />
        </>
      )}

      <path
        d={`M${-HALF_READOUT} ${-HALF_FOV} V${HALF_FOV} M${HALF_READOUT} ${-HALF_FOV} V${HALF_FOV}`}
        className="stroke-ink"
        strokeWidth="1.25"
      />
      <path
        d={`M${-HALF_READOUT} ${-HALF_FOV} H${HALF_READOUT} M${-HALF_READOUT} ${HALF_FOV} H${HALF_READOUT}`}
        className="stroke-ink-soft"
        strokeWidth="0.75"
      />
      <WovenEdge yMm={-half} outward={-1} pattern={name('ticks')} />
      <WovenEdge yMm={half} outward={1} pattern={name('ticks')} />

      <rect
        x={keepClear.fromXMm}
        y={keepClear.anteriorMm}
        width={keepClear.toXMm - keepClear.fromXMm}
        height={keepClear.posteriorMm - keepClear.anteriorMm}
        fill="none"
        className="stroke-indigo"
        strokeWidth="1.75"
        strokeDasharray="7 5"
      />
      <text
        x={keepClear.fromXMm + 8}
        y={keepClear.posteriorMm - 10}
        className="fill-ink text-[25px] sm:text-[17px]"
      >
        keep-clear area
      </text>

      {worked.thread && (
        <g className={worked.depthMm > 0 ? 'stroke-thread' : 'stroke-ochre'} strokeWidth="1.75" fill="none">
          <path d={`M0 ${worked.thread.fromMm} V${worked.thread.toMm}`} strokeDasharray="2 3" />
          <path d={`M-5 ${worked.thread.toMm + 8} L0 ${worked.thread.toMm} L5 ${worked.thread.toMm + 8}`} />
        </g>
      )}

      <g className="fill-ink text-[28px] font-bold sm:text-[20px]" textAnchor="middle">
        <text y="-192">A</text>
        <text y="208">P</text>
        <text x="-304" y="7">
          R
        </text>
        <text x="304" y="7">
          L
        </text>
      </g>
      <g className="stroke-ink" strokeWidth="1.75" fill="none">
        <path d="M170 204 H270 M170 199 V209 M270 199 V209" />
      </g>
      <text x="220" y="196" textAnchor="middle" className="figures fill-ink text-[25px] sm:text-[17px]">
        100 mm
      </text>
    </svg>
  );
}
