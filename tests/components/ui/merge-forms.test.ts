import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { formDifferences } from '@/components/ui/form-differences';
import { mergeForms, sameForm } from '@/components/ui/merge-forms';
import { protocolFormSchema } from '@/lib/schemas/protocol';

const SEED = 20_261_201;
const anyForm = fc.record({
  name: fc.string(),
  margin: fc.record({ left: fc.integer(), right: fc.integer() }),
  list: fc.array(fc.record({ a: fc.integer(), b: fc.integer() }), { maxLength: 4 }),
});

describe('putting two people’s changes together', () => {
  it('takes the only change there is, whoever made it', () => {
    fc.assert(
      fc.property(anyForm, anyForm, (base, other) => {
        expect(mergeForms(base, base, other)).toEqual(other);
        expect(mergeForms(base, other, base)).toEqual(other);
      }),
      { seed: SEED },
    );
  });

  it('keeps changes to different fields both, and mine where both changed one', () => {
    const base = { te: 90, fov: 300, list: [{ a: 1, b: 2 }] };
    expect(mergeForms(base, { ...base, te: 82 }, { ...base, fov: 310 })).toEqual({
      ...base,
      te: 82,
      fov: 310,
    });
    expect(mergeForms(base, { ...base, te: 82 }, { ...base, te: 84 })).toEqual({ ...base, te: 84 });
    expect(
      mergeForms(base, { ...base, list: [{ a: 5, b: 2 }] }, { ...base, list: [{ a: 1, b: 6 }] }),
    ).toEqual({ ...base, list: [{ a: 5, b: 6 }] });
  });

  it('takes a list of another length, or an alternative of another kind, whole', () => {
    const base = { list: [1, 2], area: { kind: 'whole' } as Record<string, unknown> };
    const theirs = { list: [1, 2, 3], area: { kind: 'box', box: 1 } };
    const mine = { list: [9, 2], area: { kind: 'box', box: 2 } };
    expect(mergeForms(base, theirs, mine)).toEqual(mine);
  });

  it('reads a missing key and one without a value alike', () => {
    expect(sameForm({ a: 1, b: undefined }, { a: 1 })).toBe(true);
    expect(sameForm({ a: 1 }, { a: 2 })).toBe(false);
    expect(sameForm([1, 2], [1])).toBe(false);
  });
});

describe('naming what differs', () => {
  it('uses the schema’s words and says which sequence', () => {
    const theirs = {
      sequences: [{ teMs: 80 }, { teMs: 80 }],
      keepClear: { area: { box: { xMm: [-160, 70] } } },
    };
    const mine = {
      sequences: [{ teMs: 80 }, { teMs: 90 }],
      keepClear: { area: { box: { xMm: [-165, 70] } } },
    };
    expect(formDifferences(protocolFormSchema, theirs, mine)).toEqual([
      { path: 'sequences.1.teMs', words: 'sequence 2 · Echo time', theirs: '80', mine: '90' },
      {
        path: 'keepClear.area.box.xMm.0',
        words: 'From the patient’s right (negative) to left (1)',
        theirs: '−160',
        mine: '−165',
      },
    ]);
  });

  it('finds nothing between a form and itself, and says “nothing” for what is not there', () => {
    fc.assert(
      fc.property(anyForm, (form) => {
        expect(formDifferences(protocolFormSchema, form, form)).toEqual([]);
      }),
      { seed: SEED },
    );
    expect(formDifferences(protocolFormSchema, {}, { name: 'Liver' })[0]).toMatchObject({
      theirs: 'nothing',
      mine: 'Liver',
    });
  });
});
