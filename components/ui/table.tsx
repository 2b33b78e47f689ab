import type { ComponentPropsWithoutRef, ReactNode } from 'react';
import { classNames } from './class-names';

/** One hairline per row, sticky header, no zebra; wide tables scroll inside their panel. */
export function Table({
  caption,
  children,
  className,
}: {
  caption: string;
  children: ReactNode;
  className?: string;
}) {
  return (
    <div className="overflow-x-auto" role="region" aria-label={caption} tabIndex={0}>
      <table className={classNames('w-full border-collapse text-left', className)}>
        <caption className="sr-only">{caption}</caption>
        {children}
      </table>
    </div>
  );
}

interface CellProps {
  /** A figure: set right, in tabular numerals. */
  readonly numeric?: boolean;
}

export function Th({ numeric, className, ...rest }: CellProps & ComponentPropsWithoutRef<'th'>) {
  return (
    <th
      scope="col"
      className={classNames(
        'sticky top-0 border-b border-ink/50 bg-panel px-2 py-2 text-note font-semibold text-quiet',
        numeric && 'text-right',
        className,
      )}
      {...rest}
    />
  );
}

export function Td({ numeric, className, ...rest }: CellProps & ComponentPropsWithoutRef<'td'>) {
  return (
    <td
      className={classNames(
        'border-b border-hairline px-2 py-2 align-baseline',
        numeric && 'text-right tabular-nums',
        className,
      )}
      {...rest}
    />
  );
}
