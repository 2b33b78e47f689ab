'use client';

import { useId, useState } from 'react';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';

/**
 * Consent and a typed signature under one offer. The button says what is missing; a press while the last one is
 * still on its way does nothing.
 */
export function SignForm({
  signer,
  sumText,
  what,
  consent,
  fault,
  reasonNot,
  onSign,
}: {
  /** The name the signer is known by. */
  signer: string;
  /** The sum being agreed to, as it is printed. */
  sumText: string;
  /** Such as `this agreement`. */
  what: string;
  consent: { readonly title: string; readonly paragraphs: readonly string[] };
  fault: string | null;
  reasonNot: string | null;
  onSign: (typedName: string) => Promise<void>;
}) {
  const [typed, setTyped] = useState('');
  const [agreed, setAgreed] = useState(false);
  const [busy, setBusy] = useState(false);
  const nameId = useId();

  const missing =
    reasonNot ??
    (!agreed
      ? 'Tick the consent above first.'
      : typed.trim().length < 3
        ? 'Type your full name first.'
        : null);

  async function sign() {
    if (busy) return;
    setBusy(true);
    try {
      await onSign(typed.trim());
    } finally {
      setBusy(false);
    }
  }

  return (
    <form
      onSubmit={(event) => {
        event.preventDefault();
        if (missing === null) void sign();
      }}
      className="grid gap-5"
    >
      <fieldset className="grid gap-3">
        <legend className="font-title text-part">{consent.title}</legend>
        {consent.paragraphs.map((paragraph) => (
          <p key={paragraph} className="max-w-prose">
            {paragraph}
          </p>
        ))}
        <label className="flex min-h-11 items-start gap-3 py-2">
          <input
            type="checkbox"
            checked={agreed}
            onChange={(event) => setAgreed(event.target.checked)}
            className="mt-1 size-5 accent-brand"
          />
          <span>I have read this and agree to use electronic records and signatures for {what}.</span>
        </label>
      </fieldset>
      <div className="max-w-lg">
        <label htmlFor={nameId} className="block font-title text-part">
          Your signature
        </label>
        <p className="text-note text-quiet">
          Type your full name as you sign it, {signer}. It stands for your signature under {what} over{' '}
          {sumText}.
        </p>
        <input
          id={nameId}
          autoComplete="name"
          value={typed}
          onChange={(event) => setTyped(event.target.value)}
          className="mt-2 min-h-14 w-full rounded-frame border-b-2 border-ink bg-transparent px-1 font-title text-page"
        />
      </div>
      {fault && <Notice kind="error">{fault}</Notice>}
      <div>
        <Button type="submit" disabled={busy} reason={missing}>
          {busy ? 'Signing' : `Sign ${what}`}
        </Button>
      </div>
    </form>
  );
}
