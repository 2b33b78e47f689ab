'use client';

import { useId, type ComponentPropsWithoutRef, type ReactNode } from 'react';
import { classNames } from './class-names';

const INPUT =
  'min-h-target w-full rounded-frame border bg-panel px-3 py-2 text-reading text-ink placeholder:text-quiet';
const edge = (fault: string | null | undefined) => (fault ? 'border-2 border-more' : 'border-ink/45');

interface FieldProps {
  readonly label: ReactNode;
  /** One sentence of help under the label. */
  readonly hint?: ReactNode;
  /** What is wrong with what was typed, as a sentence. */
  readonly fault?: string | null;
}

/** Label, hint and fault round one control; `children` gets the ids to wire. */
export function Field({
  label,
  hint,
  fault,
  className,
  children,
}: FieldProps & {
  className?: string;
  children: (wiring: {
    id: string;
    'aria-describedby': string | undefined;
    'aria-invalid': true | undefined;
  }) => ReactNode;
}) {
  const id = useId();
  const describedBy = [hint && `${id}-hint`, fault && `${id}-fault`].filter(Boolean).join(' ');
  return (
    <div className={classNames('grid gap-1', className)}>
      <label htmlFor={id} className="font-semibold">
        {label}
      </label>
      {hint && (
        <p id={`${id}-hint`} className="text-note text-quiet">
          {hint}
        </p>
      )}
      {children({
        id,
        'aria-describedby': describedBy || undefined,
        'aria-invalid': fault ? true : undefined,
      })}
      {fault && (
        <p id={`${id}-fault`} className="text-note font-semibold text-more">
          {fault}
        </p>
      )}
    </div>
  );
}

/** One line of text with its label, hint and fault. */
export function TextInput({
  label,
  hint,
  fault,
  className,
  ...rest
}: FieldProps & ComponentPropsWithoutRef<'input'>) {
  return (
    <Field label={label} hint={hint} fault={fault} className={className}>
      {(wiring) => <input {...rest} {...wiring} className={classNames(INPUT, edge(fault))} />}
    </Field>
  );
}

/** Several lines of text with label, hint and fault. */
export function TextArea({
  label,
  hint,
  fault,
  className,
  ...rest
}: FieldProps & ComponentPropsWithoutRef<'textarea'>) {
  return (
    <Field label={label} hint={hint} fault={fault} className={className}>
      {(wiring) => <textarea rows={3} {...rest} {...wiring} className={classNames(INPUT, edge(fault))} />}
    </Field>
  );
}

/** A tick box whose whole line is the target. */
export function Checkbox({
  label,
  hint,
  className,
  ...rest
}: { label: ReactNode; hint?: ReactNode } & Omit<ComponentPropsWithoutRef<'input'>, 'type'>) {
  return (
    <label className={classNames('flex min-h-target items-start gap-3 py-2', className)}>
      <input type="checkbox" {...rest} className="mt-0.5 size-5.5 shrink-0 accent-brand" />
      <span>
        {label}
        {hint && <span className="block text-note text-quiet">{hint}</span>}
      </span>
    </label>
  );
}
