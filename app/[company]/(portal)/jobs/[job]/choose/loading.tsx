import { ChoosingSkeleton } from '@/components/choosing/choosing-skeleton';

export default function ChooseLoading() {
  return <ChoosingSkeleton />;
}
