'use client';

import { useRouter } from 'next/navigation';
import { Select } from '@/components/ui/select';

export interface Choice {
  readonly id: string;
  readonly name: string;
}

/** A bench without a booking: which scanner, which protocol. The choice lives in the address. */
export function BenchChoiceHeading({
  scanners,
  protocols,
  scannerId,
  protocolId,
}: {
  scanners: readonly Choice[];
  protocols: readonly Choice[];
  scannerId: string;
  protocolId: string;
}) {
  const router = useRouter();
  const go = (scanner: string, protocol: string) => router.push(`/bench?scanner=${scanner}&protocol=${protocol}`);
  const options = (choices: readonly Choice[]) => choices.map(({ id, name }) => ({ value: id, label: name }));
  return (
    <>
      <h1 className="text-sm text-ink-soft">Bench without a booking</h1>
      <div className="mt-2.5 space-y-1">
        <Select compact layout="row" label="Scanner" value={scannerId} options={options(scanners)} onChange={(event) => go(event.target.value, protocolId)} />
        <Select compact layout="row" label="Protocol" value={protocolId} options={options(protocols)} onChange={(event) => go(scannerId, event.target.value)} />
      </div>
    </>
  );
}
