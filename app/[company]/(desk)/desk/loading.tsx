import { PageSkeleton } from '@/components/ui/skeleton';

export default function DeskLoading() {
  return <PageSkeleton label="The desk is opening" panels={2} />;
}
