/** A site of its own with a scanner, a protocol of two sequences and a booking of a known size: what most tests of services begin with. */
import type { Actor, UserActor } from '@/lib/domain/access';
import { DEFAULT_POLICY, type Prescription } from '@/lib/domain/case/model';
import { DEFAULT_PATHWAY } from '@/lib/domain/site-policy/document';
import { createBooking } from '@/lib/services/booking/create-booking';
import { createProtocol } from '@/lib/services/protocol/create-protocol';
import { createScanner } from '@/lib/services/scanner/create-scanner';
import { recordReadings } from '@/lib/services/size-reading/record-readings';
import type { BookingListItem } from '@/lib/schemas/booking';
import type { ProtocolView } from '@/lib/schemas/protocol';
import type { ScannerForm, ScannerView } from '@/lib/schemas/scanner';
import { createTestSite, type TestSite } from './database';
import { typicalPrescription, typicalScanner } from './physics-cases';

export const NOW = new Date('2026-05-04T09:00:00Z');

export interface EquippedSite {
  readonly site: TestSite;
  readonly lead: UserActor;
  readonly radiographer: UserActor;
  readonly radiologist: UserActor;
  readonly coordinator: UserActor;
  readonly scanner: ScannerView;
  readonly protocol: ProtocolView;
  readonly booking: BookingListItem;
}

export const as = (actor: Actor) => ({ actor, now: NOW });

export function scannerForm(overrides: Parameters<typeof typicalScanner>[0] = {}): ScannerForm {
  return { scanner: typicalScanner(overrides) as ScannerForm['scanner'], limitsOwner: 'The lead', limitsCheckedOn: '2026-03-02', note: '' };
}

export function sequences(): Prescription[] {
  return [typicalPrescription({ name: 'First' }), typicalPrescription({ name: 'Second', fovPhaseMm: 420 })];
}

export async function equipSite(): Promise<EquippedSite> {
  const site = await createTestSite({ accessionPattern: '@@-####' });
  const lead = await site.person('lead');
  const [radiographer, radiologist, coordinator] = [
    await site.person('radiographer'), await site.person('radiologist'), await site.person('coordinator'),
  ];
  const scanner = await createScanner(as(lead), scannerForm());
  const protocol = await createProtocol(as(lead), {
    name: 'Abdomen', region: 'abdomen', keepClearPreset: 'liver',
    keepClear: { area: { kind: 'whole-picture' }, followsWindow: false },
    sequences: sequences(),
  });
  const booking = await createBooking(as(coordinator), {
    accession: 'AB-1234', scheduledAt: '2026-05-04T10:40:00Z', slotMinutes: 40, scannerId: scanner.id, protocolId: protocol.id,
  });
  return { site, lead, radiographer, radiologist, coordinator, scanner, protocol, booking };
}

export async function sizeBooking({ radiographer, booking }: Pick<EquippedSite, 'radiographer' | 'booking'>, breadthMm = 480, depthMm = 340, now = NOW) {
  const reading = (quantity: string, value: number) => ({ quantity, value, source: 'measured', spread: 3, takenOn: '2026-05-02' });
  return recordReadings({ actor: radiographer, now }, {
    bookingId: booking.id,
    readings: [reading('breadth-mm', breadthMm), reading('depth-mm', depthMm), reading('arms-position', 1)],
  });
}

/** The standard policy as its form holds it. */
export function policyForm() {
  const { version: _version, ...form } = structuredClone(DEFAULT_POLICY);
  return { ...form, ...DEFAULT_PATHWAY };
}
