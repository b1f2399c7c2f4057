/**
 * Every DICOM attribute the project names or cites by its tag, against the data dictionary of PS3.6 as the package dcmjs
 * holds it.
 */
import { readFileSync } from 'node:fs';
import path from 'node:path';
import { data } from 'dcmjs';
import { describe, expect, it } from 'vitest';
import { filesEnding, ROOT } from '@/tests/structure/import-graph';

const byKeyword = data.DicomMetaDictionary.nameMap;
const byTag = new Map(
  Object.values(byKeyword)
    .filter((entry) => entry !== undefined)
    .map((entry) => [entry.tag, entry]),
);

/** Names as people read them, with the tag and the value type our reading of them rests on. Source: PS3.6, from memory. */
const NAMED: readonly (readonly [name: string, tag: string, vr: string, vm: string])[] = [
  ['Percent Phase Field of View', '(0018,0094)', 'DS', '1'],
  ['Percent Sampling', '(0018,0093)', 'DS', '1'],
  ['Number of Phase Encoding Steps', '(0018,0089)', 'IS', '1'],
  ['Acquisition Matrix', '(0018,1310)', 'US', '4'],
  ['In-plane Phase Encoding Direction', '(0018,1312)', 'CS', '1'],
  ['Repetition Time', '(0018,0080)', 'DS', '1'],
  ['Echo Time', '(0018,0081)', 'DS', '1'],
  ['Echo Train Length', '(0018,0091)', 'IS', '1'],
  ['Number of Averages', '(0018,0083)', 'DS', '1'],
  ['Slice Thickness', '(0018,0050)', 'DS', '1'],
  ['Spacing Between Slices', '(0018,0088)', 'DS', '1'],
  ['Flip Angle', '(0018,1314)', 'DS', '1'],
  ['Pixel Bandwidth', '(0018,0095)', 'DS', '1'],
  ['Magnetic Field Strength', '(0018,0087)', 'DS', '1'],
  ['MR Acquisition Type', '(0018,0023)', 'CS', '1'],
  ['Reconstruction Diameter', '(0018,1100)', 'DS', '1'],
  ['Patient Position', '(0018,5100)', 'CS', '1'],
  ['Pixel Spacing', '(0028,0030)', 'DS', '2'],
  ['Image Orientation (Patient)', '(0020,0037)', 'DS', '6'],
  ['Image Position (Patient)', '(0020,0032)', 'DS', '3'],
  ['Parallel Reduction Factor In-plane', '(0018,9069)', 'FD', '1'],
  ['Parallel Reduction Factor out-of-plane', '(0018,9155)', 'FD', '1'],
  ['Partial Fourier', '(0018,9081)', 'CS', '1'],
  ['Accession Number', '(0008,0050)', 'SH', '1'],
];

/** A keyword is the name without blanks and signs, each word with a capital. */
const letters = (text: string): string => text.toLowerCase().replace(/[^a-z0-9]/g, '');

const sources = filesEnding('.ts', '.tsx')
  .filter((file) => !file.startsWith('tests/external/dicom-dictionary/'))
  .map((file) => ({ file, lines: readFileSync(path.join(ROOT, file), 'utf8').split('\n') }));

/** Tags as they are written in comments, `(0018,0094)` or `0018,0094`, and as readers of files write them, `x00180094`. */
const CITED = /\bx?([0-9a-fA-F]{4}),?([0-9a-fA-F]{4})\b/g;

const citations = sources.flatMap(({ file, lines }) =>
  lines.flatMap((line, at) => {
    if (!/DICOM|'x[0-9a-f]{8}'|\(0[0-9a-f]{3},[0-9a-f]{4}\)/i.test(line)) return [];
    return [...line.matchAll(CITED)]
      .filter(([text]) => text.includes(',') || text.startsWith('x'))
      .map((found) => ({ where: `${file}:${at + 1}`, line, tag: `(${found[1]},${found[2]})`.toUpperCase() }));
  }),
);

describe('DICOM attributes against the data dictionary', () => {
  it.each(NAMED)('%s is %s, %s, %s', (name, tag, vr, vm) => {
    const entry = byTag.get(tag);
    expect(entry, `${tag} is in the dictionary`).toBeDefined();
    expect(letters(entry!.name)).toBe(letters(name));
    expect([entry!.vr, entry!.vm]).toEqual([vr, vm]);
  });

  it('every tag cited in the sources exists and stands beside its own name', () => {
    expect(citations.length).toBeGreaterThan(0);
    const wrong = citations.filter(({ line, tag }) => {
      const entry = byTag.get(tag);
      return entry === undefined || !letters(line).includes(letters(entry.name));
    });
    expect(
      wrong.map(({ where, tag }) => `${where}: ${tag} is ${byTag.get(tag)?.name ?? 'in no dictionary'}`),
    ).toEqual([]);
  });

  it('input fields that carry a DICOM name carry it as the dictionary spells it', () => {
    const schema = sources.find(({ file }) => file === 'lib/schemas/case/case-input.ts')!.lines.join('\n');
    for (const field of ['percentPhaseFieldOfView', 'percentSampling']) {
      expect(schema).toContain(field);
      expect(byKeyword[field[0]!.toUpperCase() + field.slice(1)], field).toBeDefined();
    }
  });

  it('our own names for the rest differ from the dictionary only where they say their unit or are shorter', () => {
    const model = sources.find(({ file }) => file === 'lib/physics/model/prescription.ts')!.lines.join('\n');
    // Left as the model has it, right the attribute it is read from.
    const mapped = {
      echoTrainLength: 'EchoTrainLength',
      averages: 'NumberOfAverages',
      trMs: 'RepetitionTime',
      teMs: 'EchoTime',
      flipDeg: 'FlipAngle',
      partialFourierPhase: 'PartialFourier',
    };
    for (const [ours, theirs] of Object.entries(mapped)) {
      expect(model).toMatch(new RegExp(`readonly ${ours}: `));
      expect(byKeyword[theirs], theirs).toBeDefined();
    }
  });
});
