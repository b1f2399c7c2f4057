'use client';

import { useRouter } from 'next/navigation';
import { Select } from '@/components/ui/select';

/** Which two versions stand side by side; the choice lives in the address. */
export function VersionPair({ planId, newest, before, after }: { planId: string; newest: number; before: number; after: number }) {
  const router = useRouter();
  const options = Array.from({ length: newest }, (_, index) => ({ value: String(newest - index), label: `Version ${newest - index}` }));
  const go = (a: string, b: string) => router.push(`/plans/${planId}/versions?before=${a}&after=${b}`);
  return (
    <div className="mb-6 flex flex-wrap gap-6">
      <Select label="Before" value={String(before)} options={options} onChange={(event) => go(event.target.value, String(after))} />
      <Select label="After" value={String(after)} options={options} onChange={(event) => go(String(before), event.target.value)} />
    </div>
  );
}
