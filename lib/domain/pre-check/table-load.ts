import type { Patient, Scanner } from '@/lib/domain/case/model';
import { isMeasured, standingOf } from './limits';
import type { Finding, Load } from './result';

const kg = (value: number): string => `${Math.round(value * 10) / 10} kg`;

/** The weight against the table's limit: over it is a stop that no plan, sign-off or note lifts. */
export function checkTableLoad(
  weightKg: Patient['weightKg'],
  scanner: Scanner,
): { readonly findings: readonly Finding[]; readonly table?: Load } {
  if (!weightKg) {
    return {
      findings: [{ subject: 'table', code: 'weight-unknown', text: 'No weight that counts on the day of the scan: the table load is not known.', calls: 'size-needed', needs: ['weight-kg'] }],
    };
  }
  const limit = scanner.limits.tableLimitKg;
  const table: Load = { value: weightKg.value, limit, measured: isMeasured(weightKg) };
  switch (standingOf(weightKg, limit)) {
    case 'over':
      return {
        table,
        findings: [{ subject: 'table', code: 'over-table-limit', text: `${kg(weightKg.value)} on a table for ${kg(limit)}: a stop that nothing overrides.`, calls: 'another-scanner' }],
      };
    case 'near-unmeasured':
      return {
        table,
        findings: [{ subject: 'table', code: 'weight-near-limit', text: `${kg(weightKg.value)} is within 10 % of the table’s ${kg(limit)} and was not measured.`, calls: 'size-needed', needs: ['weight-kg'], measuredOnly: true }],
      };
    case 'within':
      return { table, findings: [] };
  }
}
