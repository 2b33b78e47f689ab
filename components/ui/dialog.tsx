'use client';

import * as Radix from '@radix-ui/react-dialog';
import type { ReactNode } from 'react';
import { classNames } from './class-names';

/**
 * A sheet over the page: from the foot on a phone, in the middle on a laptop. Focus stays inside and returns;
 * Escape and the close button end it.
 */
export function Dialog({
  open,
  onOpenChange,
  title,
  about,
  wide = false,
  closable = true,
  children,
  actions,
}: {
  open: boolean;
  onOpenChange: (open: boolean) => void;
  title: ReactNode;
  /** A sentence under the title; read out with it. */
  about?: ReactNode;
  wide?: boolean;
  /** Without a close button: one of the actions must be taken. */
  closable?: boolean;
  children?: ReactNode;
  /** Buttons at the foot, which stays in sight. */
  actions?: ReactNode;
}) {
  return (
    <Radix.Root open={open} onOpenChange={onOpenChange}>
      <Radix.Portal>
        <Radix.Overlay className="fixed inset-0 z-40 bg-black/45" />
        <Radix.Content
          {...(about ? {} : { 'aria-describedby': undefined })}
          className={classNames(
            'fixed inset-x-frame bottom-frame z-50 mx-auto flex max-h-[85dvh] flex-col rounded-frame border border-ink/60 bg-panel text-ink md:top-1/2 md:bottom-auto md:-translate-y-1/2',
            wide ? 'max-w-4xl' : 'max-w-xl',
          )}
        >
          <div className="flex items-start justify-between gap-5 border-b border-hairline py-2 pr-2 pl-3 md:pl-5">
            <div className="py-1">
              <Radix.Title className="font-title text-part font-semibold">{title}</Radix.Title>
              {about && <Radix.Description className="text-quiet">{about}</Radix.Description>}
            </div>
            {closable && (
              <Radix.Close
                aria-label="Close"
                className="grid size-11 shrink-0 place-items-center rounded-frame hover:bg-plaster"
              >
                <svg viewBox="0 0 20 20" className="size-5" aria-hidden="true">
                  <path d="M4 4 L16 16 M16 4 L4 16" stroke="currentColor" strokeWidth="2" fill="none" />
                </svg>
              </Radix.Close>
            )}
          </div>
          <div className="min-h-0 flex-1 overflow-y-auto px-3 py-3 md:px-5 md:py-5">{children}</div>
          {actions && (
            <div className="flex flex-wrap gap-3 border-t border-hairline px-3 py-3 md:px-5">{actions}</div>
          )}
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  );
}
