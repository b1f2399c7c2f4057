import { LinkButton } from '@/components/ui/button';
import { EmptyState, PageBody } from '@/components/ui/page';

/** A demonstration that has been made and not filled. */
export function NoScenes() {
  return (
    <PageBody narrow>
      <EmptyState title="No scenes yet" action={<LinkButton href="/demonstrations">Demonstrations</LinkButton>}>
        Scenes come from the bench or from a set piece; then it can be presented.
      </EmptyState>
    </PageBody>
  );
}
