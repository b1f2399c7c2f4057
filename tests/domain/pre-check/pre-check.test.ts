import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { preCheck } from '@/lib/domain/pre-check/pre-check';
import { resultRank } from '@/lib/domain/pre-check/result';
import type { SizeQuantity } from '@/lib/domain/size-reading/quantities';
import { checkedProtocol, checkedScanner, KNOWN, preCheckQuestion, reading, readingsOf, wide } from '@/tests/support/pre-check-questions';
import { runsOf, tally } from '@/tests/support/tally';

const SEED = { seed: 20261202, numRuns: runsOf(40) };
const at = (time: string) => new Date(`2026-05-20T${time}:00Z`);
const codes = (check: ReturnType<typeof preCheck>) => check.findings.map(({ code }) => code);
const held = () => checkedProtocol([wide({ breathing: 'breath-hold' })]);

describe('a booking', () => {
  it('whose sizes are measured and current, on known limits, stays as booked', () => {
    const check = preCheck(preCheckQuestion());
    expect(check.findings).toEqual([]);
    expect(check).toMatchObject({ result: 'as-booked', next: { kind: 'none' }, minutesOver: 0 });
    expect(check.booked).toMatchObject({ table: { value: 110, limit: 220, measured: true } });
    expect(check.booked.opening!.clearanceMm).toBeGreaterThan(0);
    expect(check.booked.sequences[0]).toMatchObject({ verdict: 'no-fold-expected', foldProbability: 0 });
    expect(check.basis.join(' ')).toContain('Room unknown');
  });

  /** result · next · code · what is different */
  const CASES: readonly [string, string, string, string, Parameters<typeof preCheckQuestion>[0]][] = [
    ['no weight', 'size-needed', 'ask-sizes', 'weight-unknown', { readings: readingsOf({ ...KNOWN, 'weight-kg': undefined }) }],
    ['a reported weight near the table’s limit', 'size-needed', 'measure', 'weight-near-limit', { readings: [...readingsOf({ ...KNOWN, 'weight-kg': undefined }), reading('weight-kg', 198, 'reported')] }],
    ['a measured weight over the table’s limit, no other scanner', 'escalate', 'escalate', 'over-table-limit', { readings: readingsOf({ ...KNOWN, 'weight-kg': 221 }) }],
    ['a measured weight over the table’s limit, a stronger table elsewhere', 'another-scanner', 'propose', 'over-table-limit', { readings: readingsOf({ ...KNOWN, 'weight-kg': 221 }), others: [checkedScanner('B', { limits: { tableLimitKg: 260 } })] }],
    ['a reported weight over it, another table that needs it measured', 'another-scanner', 'measure', 'over-table-limit', { readings: [...readingsOf({ ...KNOWN, 'weight-kg': undefined }), reading('weight-kg', 221, 'reported')], others: [checkedScanner('B', { limits: { tableLimitKg: 240 } })] }],
    ['arms not known', 'size-needed', 'ask-sizes', 'arms-unknown', { readings: readingsOf({ ...KNOWN, 'arms-position': undefined }) }],
    ['elbows not known with the arms up', 'size-needed', 'ask-sizes', 'opening-unknown', { readings: readingsOf({ ...KNOWN, 'elbow-breadth-mm': undefined }) }],
    ['breath-hold not known', 'size-needed', 'ask-sizes', 'breath-hold-unknown', { readings: readingsOf({ ...KNOWN, 'breath-hold-s': undefined }), protocol: held() }],
    ['a breath-hold too long', 'plan-needed', 'plan', 'breath-hold-too-long', { readings: readingsOf({ ...KNOWN, 'breath-hold-s': 1 }), protocol: held() }],
    ['an opening too small', 'escalate', 'escalate', 'opening-too-small', { scanner: checkedScanner('A', { boreDiameterMm: 480 }) }],
    ['an opening nearly too small for a breadth that was worked out', 'size-needed', 'measure', 'opening-near-limit', { readings: [...readingsOf({ ...KNOWN, 'breadth-mm': undefined }), reading('breadth-mm', 465, 'reported')], scanner: checkedScanner('A', { boreDiameterMm: 520 }) }],
    ['too wide for the scanner’s usable FOV', 'plan-needed', 'plan', 'beyond-usable-fov', { scanner: checkedScanner('A', { limits: { usableFovMm: [390, 520, 500] } }) }],
    ['a protocol FOV beyond the scanner’s largest', 'escalate', 'escalate', 'fov-too-large', { scanner: checkedScanner('A', { limits: { fovMaxMm: 450 } }) }],
    ['fold in the keep-clear area', 'plan-needed', 'plan', 'fold-in-keep-clear', { protocol: checkedProtocol([wide({ fovPhaseMm: 240 })]) }],
    ['a way of sampling that is not modelled', 'plan-needed', 'plan', 'not-modelled', { protocol: checkedProtocol([wide({ trajectory: 'radial' })]) }],
    ['a slot that is too short', 'plan-needed', 'propose-time', 'slot-too-short', { booking: { slotMinutes: 5 } }],
    ['a slot outside the day’s sessions', 'another-scanner', 'propose-time', 'outside-sessions', { sessions: [{ startsAt: at('12:00'), endsAt: at('17:00') }] }],
    ['limits nobody answers for', 'escalate', 'escalate', 'limits-not-confirmed', { scanner: { ...checkedScanner('A'), document: { ...checkedScanner('A').document, limitsCheckedOn: '' } } }],
    ['a scanner out of use', 'another-scanner', 'propose', 'scanner-out-of-use', { scanner: { ...checkedScanner('A'), archivedAt: at('08:00') }, others: [checkedScanner('B')] }],
    ['readings older than the policy allows on the day', 'size-needed', 'ask-sizes', 'readings-lapsed', { booking: { scheduledAt: new Date('2026-07-20T10:00:00Z') } }],
    ['surgery since the readings', 'size-needed', 'ask-sizes', 'readings-lapsed', { booking: { surgeryOn: '2026-05-10' } }],
  ];
  it.each(CASES)('with %s: %s, %s', (_name, result, next, code, overrides) => {
    const check = preCheck(preCheckQuestion(overrides));
    expect(codes(check)).toContain(code);
    expect(check).toMatchObject({ result, next: { kind: next } });
    for (const { text } of check.findings) expect(text).not.toMatch(/\bsafe\b|will fit|patient too/i);
  });

  it('within its sessions, and with surgery before the readings, stays as booked', () => {
    const check = preCheck(preCheckQuestion({ sessions: [{ startsAt: at('08:00'), endsAt: at('12:00') }], booking: { surgeryOn: '2026-04-01' } }));
    expect(check.result).toBe('as-booked');
  });

  it('names the scanner that fits and why another does not', () => {
    const check = preCheck(preCheckQuestion({
      readings: readingsOf({ ...KNOWN, 'weight-kg': 221 }),
      others: [checkedScanner('B', { limits: { tableLimitKg: 200 } }), checkedScanner('C', { limits: { tableLimitKg: 300 } })],
    }));
    expect(check.alternatives.map(({ standing }) => standing)).toEqual(['ruled-out', 'fits']);
    expect(check.next).toMatchObject({ kind: 'propose', scannerId: 'C' });
    expect(check.alternatives[0]!.reason).toContain('221 kg on a table for 200 kg');
  });
});

/** The moderate abdomen with arms up: fold and clearance then change one way only with each size. */
const GROWING: readonly SizeQuantity[] = ['weight-kg', 'breadth-mm', 'depth-mm', 'elbow-breadth-mm', 'shoulder-breadth-mm', 'hip-breadth-mm'];

describe('whatever the sizes', () => {
  it('a larger one never makes the result better', () => {
    let moved = 0;
    fc.assert(
      fc.property(
        fc.constantFrom(...GROWING), fc.double({ min: 0.8, max: 1.9, noNaN: true }), fc.double({ min: 1, max: 1.6, noNaN: true }),
        fc.constantFrom('measured', 'reported' as const), fc.boolean(),
        (quantity, scale, growth, source, second) => {
          const at = (factor: number) => preCheck(preCheckQuestion({
            readings: [...readingsOf({ ...KNOWN, [quantity]: undefined }), reading(quantity, Math.round(KNOWN[quantity]! * factor), source as 'measured')],
            others: second ? [checkedScanner('B', { boreDiameterMm: 800, limits: { tableLimitKg: 300 } })] : [],
          })).result;
          const [small, large] = [at(scale), at(scale * growth)];
          if (small !== large) moved += 1;
          expect(resultRank(large), `${quantity} ${small} → ${large}`).toBeGreaterThanOrEqual(resultRank(small));
        },
      ),
      SEED,
    );
    expect(moved, 'cases in which it changes').toBeGreaterThan(0);
    tally('pre-check grows only worse with size', SEED.numRuns, `${moved} changed`);
  });

  it('a longer slot, a stronger table, a wider opening never make it worse', () => {
    fc.assert(
      fc.property(fc.integer({ min: 5, max: 60 }), fc.integer({ min: 90, max: 250 }), fc.integer({ min: 450, max: 800 }), fc.integer({ min: 0, max: 100 }), (slot, table, bore, more) => {
        const of = (slotMinutes: number, tableLimitKg: number, boreDiameterMm: number) => resultRank(preCheck(preCheckQuestion({
          booking: { slotMinutes }, scanner: checkedScanner('A', { boreDiameterMm, limits: { tableLimitKg } }),
        })).result);
        expect(of(slot + more, table, bore)).toBeLessThanOrEqual(of(slot, table, bore));
        expect(of(slot, table + more, bore)).toBeLessThanOrEqual(of(slot, table, bore));
        expect(of(slot, table, bore + more)).toBeLessThanOrEqual(of(slot, table, bore));
      }),
      { ...SEED, numRuns: runsOf(15) },
    );
  });

  it('what is not known never passes: without any one of the sizes it rests on nothing is as booked', () => {
    const needed: readonly SizeQuantity[] = ['breadth-mm', 'depth-mm', 'weight-kg', 'arms-position', 'elbow-breadth-mm', 'breath-hold-s'];
    fc.assert(
      fc.property(fc.subarray([...needed], { minLength: 1 }), fc.constantFrom('absent', 'expired', 'before surgery'), (missing, how) => {
        const gone = how === 'absent' ? [] : missing.map((quantity) => reading(quantity, KNOWN[quantity]!, 'measured', { takenOn: how === 'expired' ? '2026-01-01' : '2026-04-20' }));
        const check = preCheck(preCheckQuestion({
          protocol: held(), booking: { surgeryOn: how === 'before surgery' ? '2026-04-25' : '' },
          readings: [...readingsOf({ ...KNOWN, ...Object.fromEntries(missing.map((quantity) => [quantity, undefined])) }), ...gone],
        }));
        // A breadth or depth can still be worked out from weight and height; then it is an estimate and not a pass.
        const workedOut = missing.every((quantity) => quantity === 'breadth-mm' || quantity === 'depth-mm');
        expect(check.result, `${how}: ${missing.join()}`).not.toBe('as-booked');
        if (!workedOut) {
          expect(check.result, `${how}: ${missing.join()}`).toBe('size-needed');
          expect(check.next.needs!.length).toBeGreaterThan(0);
        }
      }),
      SEED,
    );
  });

  it('over the table’s limit nothing overrides: no plan, sign-off, slot or session', () => {
    const plan = {
      state: 'signed off' as const, version: 1,
      document: { scannerId: 'A', keepClear: { area: { kind: 'whole-picture' as const }, followsWindow: false }, patient: { arms: { position: 'up' } } as never, sequences: [] },
    };
    const check = preCheck(preCheckQuestion({ readings: readingsOf({ ...KNOWN, 'weight-kg': 230 }), plan, booking: { slotMinutes: 480 } }));
    expect(check.result).toBe('escalate');
    expect(codes(check)).toContain('over-table-limit');
  });

  it('set-up is what the site says it is', () => {
    const booking = { slotMinutes: 15 };
    const without = preCheck(preCheckQuestion({ booking, pathway: { setUpMinutes: 0 } }));
    const long = preCheck(preCheckQuestion({ booking, pathway: { setUpMinutes: 30 } }));
    expect(without).toMatchObject({ result: 'as-booked', minutesOver: 0 });
    expect(long.minutesNeeded).toBeCloseTo(without.minutesNeeded + 30, 6);
    expect(long).toMatchObject({ result: 'plan-needed', next: { kind: 'propose-time' }, minutesOver: Math.round((long.minutesNeeded - 15) * 10) / 10 });
    expect(long.findings.find(({ code }) => code === 'slot-too-short')!.text).toContain('30 set-up');
  });

  it('the radiologist’s area and tolerance for this exam go before the protocol’s and the policy’s', () => {
    // In the protocol's whole picture this window folds; a small box in the middle stays free of it.
    const narrow = checkedProtocol([wide({ fovPhaseMm: 230 })]);
    const box = { keepClear: { area: { kind: 'box' as const, box: { xMm: [-5, 5], yMm: [-5, 5], zMm: [-300, 300] } as const }, followsWindow: false }, keepClearPreset: 'own' };
    const protocols = preCheck(preCheckQuestion({ protocol: narrow }));
    const tolerant = preCheck(preCheckQuestion({ protocol: narrow, request: { ...box, toleratedFoldOutsidePct: null } }));
    const strict = preCheck(preCheckQuestion({ protocol: narrow, request: { ...box, toleratedFoldOutsidePct: 0 } }));
    expect(protocols.booked.sequences[0]!.verdict).toBe('fold-in-keep-clear');
    expect(tolerant).toMatchObject({ result: 'as-booked', booked: { sequences: [{ verdict: 'fold-outside-keep-clear' }] } });
    expect(strict.findings.map(({ subject }) => subject)).toContain('fold');
    expect(tolerant.basis).toContain('The keep-clear area a radiologist asked for');
  });
});
