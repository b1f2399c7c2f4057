import { LinkButton } from '@/components/ui/button';
import { EmptyState, PageBody, PageHeader } from '@/components/ui/page';

/** Nothing can be worked out for a body of unknown size; says what is missing and where to enter it. */
export function SizeNeeded({ bookingId, accession, missing }: { bookingId: string; accession: string; missing: readonly string[] }) {
  return (
    <PageBody narrow>
      <PageHeader title={accession} lead="Bench" />
      <EmptyState
        title="Size needed"
        action={
          <LinkButton variant="primary" href={`/bookings/${bookingId}`}>
            Enter sizes
          </LinkButton>
        }
      >
        <p>What folds depends on the size of the body part, and it is not known yet.</p>
        {missing.length > 0 && (
          <ul className="mt-2">
            {missing.map((line) => (
              <li key={line}>{line}</li>
            ))}
          </ul>
        )}
      </EmptyState>
    </PageBody>
  );
}
