import type { ReactNode } from 'react';
import { Panel } from './panel';
import { Telephone } from './telephone';

/** Whom to ask when one is stuck. */
export interface Contact {
  /** Such as `Rowan` or the contractor's name. */
  readonly name: string;
  readonly phone: string;
}

/** “Questions? Call Tern Hollow at 555 0142.” */
export function CallLine({ contact }: { contact: Contact }) {
  return (
    <p>
      Questions? Call {contact.name} at <Telephone phone={contact.phone} />.
    </p>
  );
}

/** A drawn empty cabinet: the frame is there, the front is not. */
function EmptyOpening({ open = false }: { open?: boolean }) {
  return (
    <svg
      viewBox="0 0 96 72"
      className="h-18 w-24 text-quiet"
      aria-hidden="true"
      fill="none"
      stroke="currentColor"
    >
      <rect x="8.5" y="8.5" width="79" height="55" strokeWidth="1.5" />
      <rect
        x="16.5"
        y="16.5"
        width="63"
        height="39"
        strokeWidth="1"
        strokeDasharray={open ? undefined : '4 3'}
      />
      {open && <path d="M16.5 16.5 L36 24 V48 L16.5 55.5" strokeWidth="1" />}
      <path d="M0 67.5 H96" strokeWidth="1" />
    </svg>
  );
}

interface StateProps {
  readonly title: string;
  readonly children?: ReactNode;
  readonly actions?: ReactNode;
  readonly contact?: Contact | null;
}

function State({
  title,
  children,
  actions,
  contact,
  open,
  level = 'h2',
}: StateProps & { open?: boolean; level?: 'h1' | 'h2' }) {
  const Heading = level;
  return (
    <Panel as="div" className="grid justify-items-start gap-3 py-8! md:px-8!">
      <EmptyOpening open={open} />
      <Heading className="font-title text-part font-semibold">{title}</Heading>
      {children && <div className="max-w-prose">{children}</div>}
      {actions && <div className="flex flex-wrap gap-3">{actions}</div>}
      {contact && <CallLine contact={contact} />}
    </Panel>
  );
}

/** Nothing is here yet, and what will be. */
export function EmptyState(props: StateProps) {
  return <State {...props} />;
}

/** Something failed: what it means, what to do, the id under which it was logged. */
export function ErrorState({
  title = 'Something did not work',
  id,
  children,
  ...rest
}: Partial<StateProps> & { id?: string | null }) {
  return (
    <div role="alert">
      <State title={title} open {...rest}>
        {children ?? (
          <p>
            Nothing you entered before is lost. Try again; if it happens once more, call and say the number
            below.
          </p>
        )}
        {id && <p className="mt-2 font-mono text-note text-quiet">{id}</p>}
      </State>
    </div>
  );
}

/** For another's address as for one that never was: the words are the same. */
export function NotFound({ title = 'There is no such page here', children, ...rest }: Partial<StateProps>) {
  return (
    <State title={title} level="h1" {...rest}>
      {children ?? <p>The address may be incomplete, or it belongs to another sign-in.</p>}
    </State>
  );
}

/** The visitor is known, the thing is not for them; `reason` says for whom it is. */
export function NotAllowed({
  title = 'This is not yours to open',
  reason,
  ...rest
}: Partial<StateProps> & { reason: string }) {
  return (
    <State title={title} level="h1" {...rest}>
      <p>{reason}</p>
    </State>
  );
}

/** The connection is gone; what was chosen is kept. */
export function Offline({ title = 'No connection just now', children, ...rest }: Partial<StateProps>) {
  return (
    <State title={title} {...rest}>
      {children ?? (
        <p>What you chose is kept on this device and is sent as soon as the connection is back.</p>
      )}
    </State>
  );
}
