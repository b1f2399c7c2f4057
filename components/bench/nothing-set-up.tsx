import { LinkButton } from '@/components/ui/button';
import { EmptyState, PageBody } from '@/components/ui/page';

/** A new site has neither scanner nor protocol: one of each is enough for a verdict. */
export function NothingSetUp({ scanner, mayEdit }: { scanner: boolean; mayEdit: boolean }) {
  const missing = scanner ? 'protocol' : 'scanner';
  return (
    <PageBody narrow>
      <EmptyState
        title={`No ${missing} yet`}
        action={
          mayEdit && (
            <LinkButton variant="primary" href={`/site/${missing}s/new`}>
              Add a {missing}
            </LinkButton>
          )
        }
      >
        {mayEdit
          ? 'One scanner and one protocol with one sequence are enough for a verdict.'
          : 'The MR lead of your site adds scanners and protocols.'}
      </EmptyState>
    </PageBody>
  );
}
