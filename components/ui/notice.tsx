import type { ReactNode } from 'react';
import { classNames } from './class-names';

export type NoticeKind = 'info' | 'caution' | 'error';

const FORMS: Readonly<Record<NoticeKind, string>> = {
  info: 'border-brand bg-panel text-ink',
  caution: 'border-caution bg-caution-ground text-caution',
  error: 'border-more bg-panel text-more',
};
const WORDS: Readonly<Record<NoticeKind, string>> = { info: 'Note', caution: 'Caution', error: 'Problem' };

/** A sentence that should not be missed, with its way out beneath. An error is announced. */
export function Notice({
  kind = 'info',
  title,
  action,
  className,
  children,
}: {
  kind?: NoticeKind;
  title?: ReactNode;
  /** A button or link: the way out. */
  action?: ReactNode;
  className?: string;
  children: ReactNode;
}) {
  return (
    <div
      role={kind === 'error' ? 'alert' : undefined}
      className={classNames('rounded-frame border border-l-4 px-3 py-2', FORMS[kind], className)}
    >
      <span className="sr-only">{WORDS[kind]}: </span>
      {title && <p className="font-semibold">{title}</p>}
      <div>{children}</div>
      {action && <div className="mt-2">{action}</div>}
    </div>
  );
}
