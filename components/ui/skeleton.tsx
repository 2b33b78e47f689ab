import { Panel } from './panel';

/** One grey piece that stands where something is about to appear; size it with class names. */
export function Skeleton({ className = 'h-6 w-full' }: { className?: string }) {
  return <div aria-hidden="true" className={`skeleton rounded-frame ${className}`} />;
}

/** A page on its way: the panels it will have, and words for those who cannot see them. */
export function PageSkeleton({
  label = 'This page is being fetched.',
  panels = 3,
}: {
  label?: string;
  panels?: number;
}) {
  return (
    <div role="status" className="grid gap-frame">
      <span className="sr-only">{label}</span>
      {Array.from({ length: panels }, (_, index) => (
        <Panel key={index} as="div">
          <Skeleton className="mb-3 h-7 w-2/5" />
          <Skeleton className="mb-2 h-5 w-full" />
          <Skeleton className="h-5 w-3/4" />
        </Panel>
      ))}
    </div>
  );
}
