/** Questions of the pre-check with everything known and nothing wrong, so that a test states only what it is about. */
import { DEFAULT_POLICY, type Prescription, type ReadingSource } from '@/lib/domain/case/model';
import type { CheckedProtocol, CheckedScanner } from '@/lib/domain/pre-check/check-on-scanner';
import type { PreCheckQuestion } from '@/lib/domain/pre-check/pre-check';
import { DEFAULT_PATHWAY } from '@/lib/domain/site-policy/document';
import type { SizeQuantity } from '@/lib/domain/size-reading/quantities';
import type { SizeReading } from '@/lib/domain/size-reading/size-reading';
import { typicalPrescription, typicalScanner } from './physics-cases';

const TAKEN = '2026-05-01';

export const reading = (
  quantity: SizeQuantity, value: number, source: ReadingSource = 'measured', overrides: Partial<SizeReading> = {},
): SizeReading => ({
  id: quantity, quantity, value, source, spread: 0, takenOn: TAKEN, recordedAt: new Date(`${TAKEN}T09:00:00Z`), ...overrides,
});

/** A moderate abdomen, everything measured, arms up. */
export const KNOWN: Readonly<Partial<Record<SizeQuantity, number>>> = {
  'breadth-mm': 400, 'depth-mm': 260, 'weight-kg': 110, 'height-cm': 172, sex: 1, 'arms-position': 1, 'breath-hold-s': 30,
  'hip-breadth-mm': 420, 'shoulder-breadth-mm': 460, 'elbow-breadth-mm': 420,
};

export function readingsOf(values: Partial<Record<SizeQuantity, number | undefined>>, source: ReadingSource = 'measured'): SizeReading[] {
  return Object.entries(values).flatMap(([quantity, value]) => (value === undefined ? [] : [reading(quantity as SizeQuantity, value, source)]));
}

export function checkedScanner(id: string, overrides: Parameters<typeof typicalScanner>[0] = {}): CheckedScanner {
  return {
    id, version: 1, archivedAt: null,
    document: { schemaVersion: 1, scanner: typicalScanner({ name: `Scanner ${id}`, ...overrides }), limitsOwner: 'The lead', limitsCheckedOn: '2026-03-02', note: '' },
  };
}

/** A window wide enough for the moderate abdomen: nothing folds. */
export const wide = (overrides: Partial<Prescription> = {}): Prescription =>
  typicalPrescription({ name: 'Wide', fovPhaseMm: 380, fovReadoutMm: 480, breathing: 'free', ...overrides });

export function checkedProtocol(prescriptions: readonly Prescription[] = [wide()]): CheckedProtocol {
  return {
    id: 'p', version: 1,
    document: { schemaVersion: 1, name: 'Abdomen', region: 'abdomen', keepClearPreset: 'none', keepClear: { area: { kind: 'whole-picture' }, followsWindow: false } },
    sequences: prescriptions.map((prescription, position) => ({ id: String(position), position, prescription })),
  };
}

export function preCheckQuestion(
  overrides: Partial<Omit<PreCheckQuestion, 'booking'>> & { readonly booking?: Partial<PreCheckQuestion['booking']> } = {},
): PreCheckQuestion {
  const { booking, ...rest } = overrides;
  return {
    booking: { scheduledAt: new Date('2026-05-20T10:00:00Z'), slotMinutes: 60, surgeryOn: '', ...booking },
    readings: readingsOf(KNOWN),
    scanner: checkedScanner('A'),
    others: [],
    protocol: checkedProtocol(),
    policy: DEFAULT_POLICY,
    pathway: DEFAULT_PATHWAY,
    sessions: [],
    ...rest,
  };
}
