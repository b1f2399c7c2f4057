import type { Clearance } from '@/lib/physics/bore/bore-types';
import type { BoreCheck } from '@/lib/physics/bore/check-bore';
import { normalQuantile } from '@/lib/physics/certainty/normal';
import type { Reading } from '@/lib/physics/model/patient';
import { SOURCE_WORDS } from './anatomy-words';
import { formatPercent } from './percent';
import { formatShort } from './round';

/** Room left at the sizes that a share `sureAt` of such patients does not exceed, mm. */
export function sureClearanceMm({ clearanceMm, spreadMm }: Clearance, sureAt: number): number {
  return clearanceMm - normalQuantile(sureAt) * spreadMm;
}

/** The section with least room at this certainty: with spread it need not be the tightest one of the sizes as given. */
export function tightestAt(check: BoreCheck, sureAt: number): Clearance | undefined {
  return [...check.sections].sort((a, b) => sureClearanceMm(a, sureAt) - sureClearanceMm(b, sureAt))[0];
}

const mm = (value: number): string => `${formatShort(Math.abs(value), 1)} mm`;

/** "81 mm of room", "this scanner’s opening is too small by 34 mm". */
const room = (value: number): string => (value < 0 ? `this scanner’s opening is too small by ${mm(value)}` : `${mm(value)} of room`);

/** The answer in a sentence or two: what the sizes given leave, and what is left at the certainty asked for. */
export function describeClearance(check: BoreCheck, sureAt: number): readonly string[] {
  const { tightest } = check;
  const sure = tightestAt(check, sureAt);
  if (!tightest || !sure) return ['No section of the body lies in the narrow part of the opening.'];
  const lines = [`Planning estimate, tightest at the ${tightest.section}: ${room(tightest.clearanceMm)}.`];
  if (sure.spreadMm > 0 && sureAt > 0.5) {
    const where = sure.section === tightest.section ? '' : `, at the ${sure.section}`;
    lines.push(
      `At sizes that ${formatPercent(sureAt * 100, 1)} of such patients do not exceed${where}: ${room(sureClearanceMm(sure, sureAt))}.`,
    );
  }
  return lines;
}

/** Who decides; said beside the estimate, never below it. */
export const WHO_DECIDES = 'Trained staff decide at the scanner.';

/** What the estimate rests on and what it leaves out. */
export function describeBasis(check: BoreCheck): readonly string[] {
  const lines = check.inside.flatMap(({ name, parts }) => {
    const [part] = parts;
    if (!part || name === 'arms') return [];
    return [`${capital(name)}: ${size(part.breadthMm)} across, ${size(part.depthMm)} deep.`];
  });
  if (check.unknown.length > 0) {
    lines.push(`Not known, so not looked at: ${check.unknown.join(', ')}.`);
  }
  lines.push(
    `Opening, table and coil are the site’s own figures; the opening is ${Math.round(check.chordAtTableMm)} mm wide at the table. Skin gives and clothing adds.`,
  );
  return lines;
}

/** Every section in words, also for those who do not see the picture. */
export function describeSections(check: BoreCheck): readonly string[] {
  return check.sections.map(({ clearanceMm, section, spreadMm }) => {
    const spread = spreadMm >= 0.5 ? `, give or take ${mm(spreadMm)}` : '';
    const left = clearanceMm < 0 ? `opening too small by ${mm(clearanceMm)}` : `${mm(clearanceMm)} of room`;
    return `${capital(section)}: ${left}${spread}.`;
  });
}

function size({ value, source, takenOn }: Reading): string {
  return `${formatShort(value, 1)} mm (${SOURCE_WORDS[source]}${takenOn ? `, ${takenOn}` : ''})`;
}

function capital(words: string): string {
  return words.charAt(0).toUpperCase() + words.slice(1);
}
