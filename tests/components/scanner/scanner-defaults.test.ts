import { expect, it } from 'vitest';
import { NEW_SCANNER } from '@/components/scanner/scanner-defaults';
import { scannerFormSchema } from '@/lib/schemas/scanner';

const LOOKED_UP = [
  'scanner.name',
  'scanner.fieldStrengthT',
  'scanner.boreDiameterMm',
  'scanner.tableBelowCentreMm',
  'scanner.anteriorCoilMm',
  'scanner.limits.fovMaxMm',
  'scanner.limits.tableLimitKg',
  'scanner.limits.usableFovMm.0',
  'scanner.limits.usableFovMm.1',
  'scanner.limits.usableFovMm.2',
];

it('asks for every figure that is peculiar to a machine, each at its own field', () => {
  const { error } = scannerFormSchema.safeParse(NEW_SCANNER);
  expect(error?.issues.map((issue) => issue.path.join('.')).sort()).toEqual([...LOOKED_UP].sort());
});
