import type { ReactNode } from 'react';
import { classNames } from './class-names';

/** The page as a face frame: panels inset with even reveals of the ground colour (10 px, 6 px on a phone). */
export function Frame({ children, className }: { children: ReactNode; className?: string }) {
  return (
    <div className={classNames('grid min-h-dvh content-start gap-frame p-frame', className)}>{children}</div>
  );
}

/** A page's title with what it is about and, on the right, what can be done. */
export function PageTitle({
  children,
  about,
  actions,
}: {
  children: ReactNode;
  about?: ReactNode;
  actions?: ReactNode;
}) {
  return (
    <div className="flex flex-wrap items-end justify-between gap-x-8 gap-y-3 px-3 pt-3 pb-1 md:px-5">
      <div>
        <h1 className="font-title text-page font-semibold">{children}</h1>
        {about && <p className="text-quiet">{about}</p>}
      </div>
      {actions && <div className="flex flex-wrap gap-3">{actions}</div>}
    </div>
  );
}
