import { Skeleton } from '@/components/ui/skeleton';

/** The choosing screen on its way: the same frame, empty. */
export function ChoosingSkeleton() {
  return (
    <div
      data-wide
      role="status"
      className="grid h-full grid-cols-[minmax(0,1fr)] grid-rows-[minmax(16rem,1fr)_auto_auto_auto] gap-frame"
    >
      <span className="sr-only">Your kitchen is being drawn.</span>
      <div className="grid place-items-center rounded-frame border border-hairline bg-panel p-5">
        <Skeleton className="h-2/3 w-4/5" />
      </div>
      <div className="flex items-center gap-5 rounded-frame border border-hairline bg-panel px-3 py-2 md:px-5">
        <Skeleton className="h-14 w-28" />
        <Skeleton className="h-7 w-56" />
      </div>
      <div className="flex gap-3 overflow-hidden rounded-frame border border-hairline bg-panel p-3 md:px-5">
        {Array.from({ length: 8 }, (_, index) => (
          <div key={index} className="grid w-31.5 shrink-0 gap-2 md:w-37.5">
            <Skeleton className="h-19 w-full md:h-24" />
            <Skeleton className="h-5 w-4/5" />
            <Skeleton className="h-6 w-1/2" />
          </div>
        ))}
      </div>
      <div className="h-24 rounded-frame bg-case" />
    </div>
  );
}
