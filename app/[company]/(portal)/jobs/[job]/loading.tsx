import { PageSkeleton } from '@/components/ui/skeleton';

export default function JobLoading() {
  return <PageSkeleton />;
}
