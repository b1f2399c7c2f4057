export interface EquivalentMutant {
  readonly file: string;
  /** The source line, without its indent. */
  readonly within: string;
  readonly code: string;
  readonly mutated: string;
  readonly reason: string;
}

const CACHE = 'A cache: how much it keeps changes what is worked out again, no answer.';
const FINER_KEY =
  'A key that tells more apart than it must: the same thing is worked out twice, no answer changes.';
const START_OF_SEARCH =
  'Where a search upwards begins: further down it only tries more before it finds the same.';
const START_OF_NEWTON = 'Where Newton’s method begins: it ends at the same root.';
const ENDS_BEFORE = 'It ends by its own smallness long before this count.';
const PAST_END = 'One step past the end of a list: nothing is there, and nothing is added.';
const ROOM = 'Room set aside ahead of need: how much enters no answer.';
const TIE = 'Differs only where two figures are equal to the last bit, and both ways then give the same.';
const NONE_OR_MUCH = 'What is compared is nothing but rounding or far more than either limit.';
const FINER_ROWS = 'More rows to break at: areas are summed in smaller pieces to the same sum.';
const NO_NODE = 'No node of the sum lies on the end of a band.';
const NO_TRAIN = 'No echo and one echo are both within every scanner’s longest train.';
const EITHER = 'Of two equally tight places either may be named; the clearance is the same.';

/** Changes of one source line that are equivalent for one reason. */
const at = (
  file: string,
  within: string,
  reason: string,
  ...changes: readonly (readonly [code: string, mutated: string])[]
): EquivalentMutant[] =>
  changes.map(([code, mutated]) => ({ file: `lib/physics/${file}.ts`, within, code, mutated, reason }));

/**
 * Mutants that change no answer, with the reason: no test can tell them from the code. Matched by file, line and text;
 * one that a test tells apart all the same, or that is no longer there, is reported.
 */
export const EQUIVALENT: readonly EquivalentMutant[] = [
  ...at(
    'acceleration/ghost-widths',
    'return high > low ? [Math.max(low, 0), high] : undefined;',
    'A band has height, so the two are never equal; without any band low lies above high.',
    ['high > low', 'high >= low'],
  ),
  ...at(
    'acceleration/ghost-widths',
    'if (beyondHalf > 1e-12) {',
    NONE_OR_MUCH,
    ['beyondHalf > 1e-12', 'beyondHalf >= 1e-12'],
    ['1e-12', '0.000001'],
  ),
  ...at(
    'acceleration/ghost-widths',
    '} else if (beyondHalf < -1e-12) {',
    NONE_OR_MUCH,
    ['beyondHalf < -1e-12', 'beyondHalf <= -1e-12'],
    ['1e-12', '0.000001'],
  ),
  ...at('acceleration/ghost-widths', 'if (at0 < 0 || at1 < 0) {', 'At at1 = 0 the root is r1 itself.', [
    'at1 < 0',
    'at1 <= 0',
  ]),
  ...at(
    'acceleration/ghost-widths',
    'if (at0 < 0) r0 = root;',
    'With at0 = 0 and at1 below it the row was left before.',
    ['at0 < 0', 'at0 <= 0'],
  ),
  ...at(
    'assess/geometry-class',
    'if (this.answers.size > this.most) this.answers.delete(this.answers.keys().next().value!);',
    CACHE,
    ['this.answers.size > this.most', 'this.answers.size <= this.most'],
    ['this.answers.size > this.most', 'this.answers.size >= this.most'],
  ),
  ...at(
    'assess/geometry-class',
    "a.factorPhase * a.factorSlice > 1 && a.unfolding === 'image-domain-grid-ends'",
    FINER_KEY,
    ['a.factorPhase * a.factorSlice > 1', 'a.factorPhase * a.factorSlice >= 1'],
  ),
  ...at('assess/slab-result', 'const answers = new KeptAnswers<SlabResult>(256);', CACHE, ['256', '259']),
  ...at(
    'assess/round-assessment',
    '[/Mm2$/, 0.1],',
    'The quantum is used by its inverse, rounded to a whole number: 10 either way.',
    ['0.1', '0.101'],
  ),
  ...at(
    'assess/detail-of',
    'const frame = sectionFrame(p, 0);',
    'Only the frame’s directions are used, and they are the same in every slice.',
    ['0', '1'],
  ),
  ...at(
    'body/outline-trapezoids',
    'for (let i = 0; i + 1 < breaks.length; i++) {',
    PAST_END,
    ['i + 1', 'i - 1'],
    ['i + 1 < breaks.length', 'i + 1 <= breaks.length'],
    ['1', '0'],
  ),
  ...at('body/outline-trapezoids', 'if (u1 - u0 < 1e-6) continue;', TIE, [
    'u1 - u0 < 1e-6',
    'u1 - u0 <= 1e-6',
  ]),
  ...at(
    'body/outline-trapezoids',
    'if (upper.offset + upper.slope * middle - (lower.offset + lower.slope * middle) < 1e-6) continue;',
    TIE,
    [
      'upper.offset + upper.slope * middle - (lower.offset + lower.slope * middle) < 1e-6',
      'upper.offset + upper.slope * middle - (lower.offset + lower.slope * middle) <= 1e-6',
    ],
  ),
  ...at(
    'bore/farthest-point',
    'let best = 0;',
    'The search closes in on both sides of its best start, so its neighbour brackets the same place.',
    ['0', '1'],
  ),
  ...at(
    'bore/farthest-point',
    'for (let k = 1; k < STARTS; k += 1) if (squared(k * step) > squared(best * step)) best = k;',
    EITHER,
    ['squared(k * step) > squared(best * step)', 'squared(k * step) >= squared(best * step)'],
  ),
  ...at('bore/farthest-point', 'if (f(middle) > f(answer)) answer = middle;', EITHER, [
    'f(middle) > f(answer)',
    'f(middle) >= f(answer)',
  ]),
  ...at(
    'certainty/fold-probability',
    'return other === middle || Math.abs(other - middle) < 1e-6;',
    NONE_OR_MUCH,
    ['Math.abs(other - middle) < 1e-6', 'Math.abs(other - middle) <= 1e-6'],
  ),
  ...at(
    'certainty/normal',
    'for (let k = 1; term > sum * 1e-17 && k < 200; k++) {',
    ENDS_BEFORE,
    ['200', '202'],
    ['k < 200', 'k <= 200'],
  ),
  ...at(
    'certainty/normal',
    'return x >= 0 ? 1 - upperTail(x) : upperTail(-x);',
    'At 0 either half is one half.',
    ['x >= 0', 'x > 0'],
  ),
  ...at(
    'certainty/normal',
    'let z = Math.min(7, Math.log(p / (1 - p)) / 1.702);',
    START_OF_NEWTON,
    ['Math.min', 'Math.max'],
    ['7', '8'],
    ['1.702', '1.71902'],
    ['Math.log(p / (1 - p)) / 1.702', 'Math.log(p / (1 - p)) * 1.702'],
  ),
  ...at(
    'certainty/normal',
    'for (let step = 0; step < 60; step++) {',
    ENDS_BEFORE,
    ['60', '61'],
    ['step < 60', 'step <= 60'],
    ['0', '1'],
  ),
  ...at(
    'certainty/normal',
    'if (Math.abs(bounded) < 1e-14) break;',
    'Newton’s method doubles its digits: after a step below 1e-8 the error is below 1e-15.',
    ['1e-14', '1e-8'],
    ['Math.abs(bounded) < 1e-14', 'Math.abs(bounded) <= 1e-14'],
  ),
  ...at(
    'fold/acquired-lines',
    'let lines = nextAcquiredLines(linesAcrossFov, Math.floor((minWidthMm * linesAcrossFov) / fovMm) - 1, step);',
    START_OF_SEARCH,
    ['minWidthMm * linesAcrossFov', 'minWidthMm / linesAcrossFov'],
  ),
  ...at(
    'fold/alias-family',
    'const alike = !tissue.varies && source.sMm > tissue.lowMm && source.sMm < tissue.highMm;',
    'Alike sections are passed over to save work: beyond the solid’s end they are empty, within it looked at again.',
    ['source.sMm < tissue.highMm', 'source.sMm >= tissue.highMm'],
  ),
  ...at(
    'fold/alias-family',
    'if (tissue.coupled && margin.slice[0] + margin.slice[1] > 0) {',
    'Without margin the second look is the first again.',
    ['margin.slice[0] + margin.slice[1] > 0', 'margin.slice[0] + margin.slice[1] >= 0'],
  ),
  ...at(
    'fold/alias-family',
    'if (low < one[1] && high > one[0]) {',
    'Intervals left apart forbid the same widths: widths are joined when all are known.',
    ['0', '1'],
    ['1', '0'],
  ),
  ...at(
    'fold/forbidden-widths',
    'for (let n = 1; (high * factor) / (n + offset) > from; n++) {',
    'An interval that ends at the narrowest width asked for forbids none of them.',
    ['(high * factor) / (n + offset) > from', '(high * factor) / (n + offset) >= from'],
  ),
  ...at(
    'fold/forbidden-widths',
    'if (pairs.length <= 2) return pairs;',
    'One interval, or none, is what merging gives as well.',
    ['pairs.length <= 2', 'pairs.length < 2'],
    ['2', '3'],
  ),
  ...at(
    'fold/forbidden-widths',
    'if (end >= 0 && low < merged[end]!) merged[end] = Math.max(merged[end]!, high);',
    'The list holds pairs, so its last index is −1 or odd.',
    ['end >= 0', 'end > 0'],
  ),
  ...at('fold/forbidden-widths', 'for (let i = 0; i < set.length; i += 2) {', PAST_END, [
    'i < set.length',
    'i <= set.length',
  ]),
  ...at(
    'fold/landed-area',
    'const r = middle + half * Math.sin((Math.PI / 2) * x);',
    'The nodes lie evenly about the middle.',
    ['middle + half * Math.sin((Math.PI / 2) * x)', 'middle - half * Math.sin((Math.PI / 2) * x)'],
  ),
  ...at(
    'fold/landed-area',
    'if (r > band.r0 && r < band.r1) {',
    NO_NODE,
    ['r > band.r0', 'r >= band.r0'],
    ['r < band.r1', 'r <= band.r1'],
  ),
  ...at(
    'fold/landed-area',
    'if (r <= band.r0 || r >= band.r1) continue;',
    NO_NODE,
    ['r <= band.r0', 'r < band.r0'],
    ['r >= band.r1', 'r > band.r1'],
  ),
  ...at(
    'fold/landed-area',
    'for (const edge of [low, high]) for (let i = -2; i <= 2; i++) if (i !== 0) levels.push(edge + i * step);',
    FINER_ROWS,
    ['2', '3'],
  ),
  ...at(
    'fold/tissue-sections',
    'const known = covered.find((one) => coarse[0] < one[1] && coarse[1] > one[0]);',
    TIE,
    ['coarse[0] < one[1]', 'coarse[0] <= one[1]'],
    ['coarse[1] > one[0]', 'coarse[1] >= one[0]'],
  ),
  ...at(
    'geometry/micrometres',
    'return Math.floor(mm * 1000 + 0.5 + 1e-5);',
    'Any bias between the rounding of a double and a hundredth of a micrometre does the same.',
    ['1e-5', '0.000010100000000000002'],
  ),
  ...at(
    'image/row-intervals',
    'if (a <= FLAT * Math.max(q.xx, q.zz)) {',
    NONE_OR_MUCH,
    ['FLAT * Math.max(q.xx, q.zz)', 'FLAT / Math.max(q.xx, q.zz)'],
    ['a <= FLAT * Math.max(q.xx, q.zz)', 'a < FLAT * Math.max(q.xx, q.zz)'],
    ['Math.max', 'Math.min'],
  ),
  ...at('image/row-intervals', 'const FLAT = 1e-13;', NONE_OR_MUCH, ['1e-13', '1.0000000000000001e-7']),
  ...at(
    'image/row-intervals',
    'for (let i = 0; i + 1 < edges.length; i++) {',
    PAST_END,
    ['i + 1 < edges.length', 'i + 1 <= edges.length'],
    ['i + 1', 'i - 1'],
    ['1', '0'],
  ),
  ...at('section/convex-solid', 'const FLAT = 1e-13;', NONE_OR_MUCH, ['1e-13', '1.0000000000000001e-7']),
  ...at('section/convex-solid', 'if (alpha <= FLAT * scale * scale) {', NONE_OR_MUCH, [
    'alpha <= FLAT * scale * scale',
    'alpha < FLAT * scale * scale',
  ]),
  ...at(
    'section/row-band',
    'for (const r of crossings(all[i]!, all[j]!)) if (r > r0 + TOUCH_MM && r < r1 - TOUCH_MM) breaks.push(r);',
    TIE,
    ['r > r0 + TOUCH_MM', 'r >= r0 + TOUCH_MM'],
    ['r < r1 - TOUCH_MM', 'r <= r1 - TOUCH_MM'],
  ),
  ...at('section/band-outline', 'Math.abs(last.r1 - band.r0) < 1e-6 &&', NONE_OR_MUCH, [
    'Math.abs(last.r1 - band.r0) < 1e-6',
    'Math.abs(last.r1 - band.r0) <= 1e-6',
  ]),
  ...at(
    'size/combine-readings',
    'readings.slice(i + 1).flatMap((b) => {',
    'A reading does not conflict with itself.',
    ['1', '0'],
  ),
  ...at(
    'size/combine-readings',
    '...(dates.length > 0 ? { takenOn: dates.reduce((a, b) => (a < b ? a : b)) } : {}),',
    'Equal dates are the same date.',
    ['a < b', 'a <= b'],
  ),
  ...at(
    'slab/contaminated-partitions',
    'if (offsetMm < tissue.rangeMm[0] || offsetMm > tissue.rangeMm[1]) return 0;',
    'Only places within the range are asked about.',
    [
      'offsetMm < tissue.rangeMm[0] || offsetMm > tissue.rangeMm[1]',
      'offsetMm < tissue.rangeMm[0] && offsetMm > tissue.rangeMm[1]',
    ],
  ),
  ...at('slab/slab-pulse', 'const tips = new Float64Array(2 * steps);', ROOM, ['2', '3']),
  ...at('slab/slab-response', 'if (index < this.filled) return;', ROOM, [
    'index < this.filled',
    'index <= this.filled',
  ]),
  ...at(
    'slab/slab-response',
    'const wanted = index + Math.ceil(0.5 / this.spacing);',
    ROOM,
    ['0.5 / this.spacing', '0.5 * this.spacing'],
    ['0.5', '0.505'],
    ['Math.ceil', 'Math.floor'],
  ),
  ...at('acceleration/ghost-widths', 'lowers.unshift(moved > 0 ? nearest : farthest);', NONE_OR_MUCH, [
    'moved > 0',
    'moved >= 0',
  ]),
  ...at('acceleration/ghost-widths', 'uppers.unshift(moved > 0 ? farthest : nearest);', NONE_OR_MUCH, [
    'moved > 0',
    'moved >= 0',
  ]),
  ...at('assess/hard-limits', 'return Math.ceil((time?.acquiredViews ?? 1) / p.shots);', NO_TRAIN, [
    '1',
    '0',
  ]),
  ...at('assess/hard-limits', 'return time?.acquiredViews ?? 1;', NO_TRAIN, ['1', '0']),
  ...at(
    'body/outline-trapezoids',
    'for (let j = i + 1; j < edges.length && edges[j]!.u0 < a.u1; j++) {',
    'An edge that begins where the other ends crosses it nowhere inside.',
    ['edges[j]!.u0 < a.u1', 'edges[j]!.u0 <= a.u1'],
  ),
  ...at(
    'bore/bore-clearance',
    'const tightest = clearances.reduce((least, one) => (one.clearanceMm < least.clearanceMm ? one : least));',
    EITHER,
    ['one.clearanceMm < least.clearanceMm', 'one.clearanceMm <= least.clearanceMm'],
  ),
  ...at(
    'image/row-intervals',
    '!(intervals[layer] !== undefined && intervals[layer]![0] < middle && intervals[layer]![1] > middle)',
    'The middle of a stretch lies on no edge: edges are its ends.',
    ['intervals[layer]![0] < middle', 'intervals[layer]![0] <= middle'],
    ['intervals[layer]![1] > middle', 'intervals[layer]![1] >= middle'],
  ),
  ...at(
    'image/resample',
    'for (let x = 0; x < widthPx; x++) {',
    'One pixel past a row is the next row’s first, written again in its turn; past the last there is none.',
    ['x < widthPx', 'x <= widthPx'],
  ),
];
