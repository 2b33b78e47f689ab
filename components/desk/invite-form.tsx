'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Checkbox, TextInput } from '@/components/ui/field';
import { sendJson } from '@/components/ui/json';
import { Notice } from '@/components/ui/notice';
import type { Fault } from '@/lib/contracts/result';
import { paths } from '@/lib/paths';

/** Invites one person of the household by mail. */
export function InviteForm({ company, jobId }: { company: string; jobId: string }) {
  const router = useRouter();
  const [name, setName] = useState('');
  const [email, setEmail] = useState('');
  const [signer, setSigner] = useState(true);
  const [busy, setBusy] = useState(false);
  const [sentTo, setSentTo] = useState<string | null>(null);
  const [fault, setFault] = useState<Fault | null>(null);

  const faultOf = (field: string) => fault?.faults?.find((one) => one.path === field)?.message;

  async function send() {
    setBusy(true);
    setFault(null);
    setSentTo(null);
    const answer = await sendJson(paths.api.invitations(company, jobId), 'POST', { name, email, signer });
    setBusy(false);
    if (!answer.ok) return setFault(answer.fault);
    setSentTo(email);
    setName('');
    setEmail('');
    router.refresh();
  }

  return (
    <form
      className="grid max-w-xl gap-3"
      onSubmit={(event) => {
        event.preventDefault();
        if (!busy) void send();
      }}
    >
      <TextInput
        label="Name"
        value={name}
        fault={faultOf('name')}
        autoComplete="off"
        onChange={(event) => setName(event.target.value)}
      />
      <TextInput
        label="Mail address"
        type="email"
        value={email}
        fault={faultOf('email')}
        autoComplete="off"
        onChange={(event) => setEmail(event.target.value)}
      />
      <Checkbox
        label="Signs for the household"
        hint="Every page of the job book needs this person's signature."
        checked={signer}
        onChange={(event) => setSigner(event.target.checked)}
      />
      {fault && <Notice kind="error">{fault.sentence}</Notice>}
      {sentTo && <Notice kind="info">The invitation is on its way to {sentTo}.</Notice>}
      <div>
        <Button type="submit" disabled={busy}>
          Send the invitation
        </Button>
      </div>
    </form>
  );
}
