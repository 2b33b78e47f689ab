import { createTransport, type Transporter } from 'nodemailer';
import { environment } from './environment';

export interface OutgoingMail {
  /** Decides the Message-ID, so that a mail sent twice by a retried job is recognised as one. */
  readonly id: string;
  readonly fromName: string;
  readonly to: { readonly name: string; readonly email: string };
  readonly subject: string;
  readonly text: string;
  readonly html: string;
}

let held: { url: string; transport: Transporter } | undefined;

function transport(url: string): Transporter {
  if (held?.url !== url) {
    held?.transport.close();
    held = {
      url,
      transport: createTransport({
        url,
        connectionTimeout: 10_000,
        greetingTimeout: 10_000,
        socketTimeout: 20_000,
      }),
    };
  }
  return held.transport;
}

/** Hands one mail to the mail server. Throws when it is not taken; the caller tries again. */
export async function sendMail(mail: OutgoingMail): Promise<void> {
  const { SMTP_URL, MAIL_DOMAIN } = environment();
  await transport(SMTP_URL).sendMail({
    messageId: `<${mail.id}@${MAIL_DOMAIN}>`,
    from: { name: mail.fromName, address: `no-reply@${MAIL_DOMAIN}` },
    to: { name: mail.to.name, address: mail.to.email },
    subject: mail.subject,
    text: mail.text,
    html: mail.html,
    headers: { 'Auto-Submitted': 'auto-generated' },
    disableFileAccess: true,
    disableUrlAccess: true,
  });
}
