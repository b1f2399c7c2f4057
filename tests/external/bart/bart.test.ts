/**
 * Source: BART 0.8.00 (Debian package `bart`), analytic k-space of its Shepp-Logan phantom; see
 * fixtures/published/bart-fold/README.md. Compared from file; where the package is installed the file's own figures are
 * measured again and compared too.
 */
import { readFileSync } from 'node:fs';

import { describe, expect, it } from 'vitest';

import { drawSection } from '@/lib/physics/section/draw-section';
import { foldPosition } from '@/lib/physics/fold/fold-position';
import { assess } from '@/lib/physics';
import type { Case } from '@/lib/physics/model/case';
import { accelerated, NO_MARGIN, typicalCase, typicalPatient, typicalPolicy, typicalPrescription, typicalScanner } from '@/tests/support/physics-cases';

import { measureFold, type MeasuredFold } from './measure-fold';
import { GHOST_CASES, GHOST_GRID, measureGhosts, type GhostCase, type MeasuredGhosts } from './measure-ghosts';
import { BART_PRESCRIPTIONS, type BartPrescription, LONG_SHARE, SHORT_SHARE } from './prescriptions';
import { Bart, bartIsInstalled } from './toolbox';

const read = <T>(file: string): T[] =>
  JSON.parse(readFileSync(new URL(`../../../fixtures/published/bart-fold/${file}`, import.meta.url), 'utf8')) as T[];
const FOLD = read<MeasuredFold>('fold.json');
const GHOSTS = read<MeasuredGhosts>('ghosts.json');

interface Posed {
  readonly phaseHalfMm: number;
  readonly readoutHalfMm: number;
  readonly shiftMm: number;
  readonly fovMm: number;
  readonly lines: number;
  readonly acquiredLines: number;
  readonly keepClearMm: readonly [number, number];
}

/** The phantom's outer ellipse, axial, phase A–P, posed as anyone would pose it. */
function pose(p: Posed, acceleration = accelerated(1)): Case {
  const fovReadoutMm = 2 * p.readoutHalfMm + 40;
  return typicalCase({
    patient: typicalPatient({
      parts: [
        {
          name: 'phantom',
          kind: 'trunk',
          shape: {
            type: 'elliptic-cylinder',
            along: 'z',
            centreMm: [0, p.shiftMm, 0],
            semiAxesMm: [p.readoutHalfMm, p.phaseHalfMm],
          },
          signalWeight: 1,
          estimated: false,
        },
      ],
    }),
    prescription: typicalPrescription({
      phaseAxis: 'AP',
      fovPhaseMm: p.fovMm,
      fovReadoutMm,
      linesAcrossFov: p.lines,
      acquiredLines: p.acquiredLines,
      acceleration,
    }),
    keepClear: {
      area: {
        kind: 'box',
        box: { xMm: [-fovReadoutMm / 2, fovReadoutMm / 2], yMm: p.keepClearMm, zMm: [-400, 400] },
      },
      followsWindow: false,
    },
    scanner: typicalScanner({
      phaseFovMayExceedReadoutFov: true,
      limits: { fovMinMm: 20, fovMaxMm: 900, usableFovMm: [900, 900, 900], matrixMax: 2048, acquiredLinesMax: 4096, phaseOversamplingMaxPct: 400 },
    }),
    policy: typicalPolicy({ marginMm: NO_MARGIN }),
  });
}

const foldCase = (c: BartPrescription, acquiredLines: number) =>
  pose({
    phaseHalfMm: c.phaseAlong === 'long' ? c.longHalfMm : (c.longHalfMm * SHORT_SHARE) / LONG_SHARE,
    readoutHalfMm: c.phaseAlong === 'long' ? (c.longHalfMm * SHORT_SHARE) / LONG_SHARE : c.longHalfMm,
    shiftMm: c.shiftMm,
    fovMm: c.fovMm,
    lines: c.lines,
    acquiredLines,
    keepClearMm: c.keepClearMm,
  });

describe('the smallest width that is enough, against analytic k-space', () => {
  it('holds every prescription posed', () => {
    expect(FOLD.map((m) => m.name)).toEqual(BART_PRESCRIPTIONS.map((c) => c.name));
    expect(FOLD.length).toBeGreaterThanOrEqual(12);
  });

  it.each(BART_PRESCRIPTIONS)('$name', (c) => {
    const measured = FOLD.find((m) => m.name === c.name)!;
    const answer = assess(foldCase(c, c.lines));
    const lines = answer.width!.firstCleanLines!;
    // The sweep knows even counts only, so one line is what it cannot tell.
    expect(Math.abs(lines - measured.firstCleanLines)).toBeLessThanOrEqual(1);
    expect(assess(foldCase(c, measured.firstCleanLines + 1)).fold!.inKeepClear).toBe(false);
    const needsMore = measured.firstCleanLines > c.lines + 1;
    if (needsMore) expect(assess(foldCase(c, measured.firstCleanLines - 2)).fold!.inKeepClear).toBe(true);
  });
});

describe('where tissue lands, against analytic k-space', () => {
  it.each(BART_PRESCRIPTIONS)('$name', (c) => {
    const { wide, wideLines, folded, foldedLines } = FOLD.find((m) => m.name === c.name)!;
    const pixel = c.fovMm / c.lines;
    const landed = Array<number>(foldedLines).fill(0);
    wide.forEach((signal, i) => {
      const p = (i - Math.floor(wideLines / 2)) * pixel;
      const at = Math.round(foldPosition(p, 0, foldedLines * pixel) / pixel) + Math.floor(foldedLines / 2);
      landed[(at + foldedLines) % foldedLines]! += signal;
    });
    const top = Math.max(...folded.map(Math.abs));
    // The ends of sampled k-space differ by half a sample between two widths: 1e-3 of the brightest row.
    landed.forEach((signal, i) => expect(Math.abs(signal - folded[i]!) / top).toBeLessThan(1e-3));
  });
});

/** Mean error inside and outside the rows where the engine draws a ghost of some section row. */
function ghostContrast(c: GhostCase, measured: MeasuredGhosts): { inside: number; outside: number; ghosts: number } {
  const half = (c.lines - 1) / 2;
  const question = pose(
    {
      phaseHalfMm: LONG_SHARE * GHOST_GRID,
      readoutHalfMm: SHORT_SHARE * GHOST_GRID,
      shiftMm: 0,
      fovMm: c.lines,
      lines: c.lines,
      acquiredLines: c.lines,
      keepClearMm: [-half, half],
    },
    accelerated(c.factor, { unfolding: 'image-domain-grid-ends' }),
  );
  const { ghosts } = drawSection(question);
  const rows = ghosts.flatMap((g) => g.landed).map((ring) => ring.map(([, phase]) => phase));
  const inside: number[] = [];
  const outside: number[] = [];
  measured.errorPpm.forEach((ppm, i) => {
    const p = i - c.lines / 2;
    const distance = Math.min(...rows.map((ps) => Math.max(Math.min(...ps) - p, p - Math.max(...ps), 0)));
    if (distance === 0) inside.push(ppm);
    // Two pixels of ringing round a ghost belong to neither.
    else if (distance > 2) outside.push(ppm);
  });
  const mean = (v: number[]) => v.reduce((a, b) => a + b, 0) / Math.max(1, v.length);
  return { inside: mean(inside), outside: mean(outside), ghosts: ghosts.length };
}

describe('ghosts of unfolding on a grid that ends at the acquired width', () => {
  it.each(GHOST_CASES)('$name', (c) => {
    const measured = GHOSTS.find((m) => m.name === c.name)!;
    const { inside, outside, ghosts } = ghostContrast(c, measured);
    if (c.lines / 2 >= LONG_SHARE * GHOST_GRID) {
      // W ≥ 2·max|p − c|: no ghost, and the toolbox's error is numerical only (below 100 ppm a row).
      expect(ghosts).toBe(0);
      expect(Math.max(...measured.errorPpm)).toBeLessThan(100);
    } else {
      expect(ghosts).toBeGreaterThan(0);
      // An unfolding without the outlying tissue spreads some error everywhere (most at 96 lines, where a sixth of the
      // body lies beyond the grid: 4.1 times; from 104 lines on, above 10). By chance the two would be equal.
      expect(inside / outside).toBeGreaterThan(c.lines < 100 ? 4 : 10);
    }
  });
});

if (bartIsInstalled()) {
  describe('the file’s figures, measured again', () => {
    const long = process.env.SELVEDGE_LONG === '1';
    it.each(long ? BART_PRESCRIPTIONS : BART_PRESCRIPTIONS.slice(3, 6))('fold: $name', (c) => {
      const bart = new Bart();
      try {
        const again = measureFold(bart, c);
        const kept = FOLD.find((m) => m.name === c.name)!;
        expect(again.firstCleanLines).toBe(kept.firstCleanLines);
        // Single-precision transforms differ between builds in the sixth digit.
        const top = Math.max(...kept.folded.map(Math.abs));
        again.folded.forEach((v, i) => expect(Math.abs(v - kept.folded[i]!) / top).toBeLessThan(1e-5));
      } finally {
        bart.close();
      }
    });

    it.each(long ? GHOST_CASES : GHOST_CASES.slice(2, 3))('ghosts: $name', (c) => {
      const bart = new Bart();
      try {
        const again = ghostContrast(c, measureGhosts(bart, c));
        const kept = ghostContrast(c, GHOSTS.find((m) => m.name === c.name)!);
        // Iterative unfolding: the same place, a similar height.
        expect(again.ghosts).toBe(kept.ghosts);
        if (kept.ghosts > 0) expect(again.inside / kept.inside).toBeCloseTo(1, 1);
      } finally {
        bart.close();
      }
    });
  });
}

it('says what was compared', () => {
  console.log(`BART: ${FOLD.length} prescriptions and ${GHOSTS.length} unfoldings compared ${bartIsInstalled() ? 'from file and measured again' : 'from file'}.`);
  expect(FOLD.length + GHOSTS.length).toBe(BART_PRESCRIPTIONS.length + GHOST_CASES.length);
});
