import type { ErrorView } from '@/lib/domain/errors';
import { Notice } from './notice';

/** What went wrong with a form as a whole, announced, with the number to quote when it is ours to find. */
export function FormProblem({ problem }: { problem: Pick<ErrorView, 'message' | 'incidentId'> | null }) {
  if (!problem) return null;
  return (
    <Notice tone="error" live>
      <p>{problem.message}</p>
      {problem.incidentId && (
        <p className="mt-1 text-sm">
          Number to quote: <span className="figures">{problem.incidentId}</span>
        </p>
      )}
    </Notice>
  );
}
