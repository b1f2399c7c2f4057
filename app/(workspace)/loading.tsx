import { PageSkeleton } from '@/components/ui/page';

export default function Loading() {
  return <PageSkeleton />;
}
