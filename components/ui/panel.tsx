import type { ComponentPropsWithoutRef, ReactNode } from 'react';
import { classNames } from './class-names';

interface PanelProps extends Omit<ComponentPropsWithoutRef<'section'>, 'title'> {
  readonly as?: 'section' | 'div' | 'header' | 'article' | 'footer' | 'nav' | 'aside';
  /** A part title above the content. */
  readonly title?: ReactNode;
  /** Beside the title, on the right. */
  readonly actions?: ReactNode;
  /** No padding: for a picture or a table that reaches the edges. */
  readonly flush?: boolean;
}

/** A flat field with hairline edges, set into the frame. */
export function Panel({
  as: Tag = 'section',
  title,
  actions,
  flush,
  className,
  children,
  ...rest
}: PanelProps) {
  return (
    <Tag
      className={classNames(
        'min-w-0 rounded-frame border border-hairline bg-panel',
        !flush && 'px-3 py-3 md:px-5 md:py-5',
        className,
      )}
      {...rest}
    >
      {(title || actions) && (
        <div
          className={classNames(
            'flex flex-wrap items-baseline justify-between gap-x-5 gap-y-1',
            flush ? 'px-3 pt-3 md:px-5 md:pt-5' : 'mb-3',
          )}
        >
          {title && <h2 className="font-title text-part font-semibold">{title}</h2>}
          {actions}
        </div>
      )}
      {children}
    </Tag>
  );
}
