import { createTransport } from 'nodemailer';

const SUBJECTS = {
  email_code: 'is your sign-in code',
  reset_password_email_code: 'is your code to set a new password',
} as const;

/** Mails codes, as the service does by itself. */
export class CodeMail {
  private readonly transport;

  constructor(
    smtpUrl: string,
    private readonly domain: string,
  ) {
    this.transport = createTransport({
      url: smtpUrl,
      connectionTimeout: 5000,
      greetingTimeout: 5000,
      socketTimeout: 10_000,
    });
  }

  /** Throws when the mail server does not take it. */
  async send(to: string, code: string, purpose: keyof typeof SUBJECTS): Promise<void> {
    const use =
      purpose === 'email_code'
        ? 'Type it on the page where you asked for it'
        : 'With it you set a new password';
    await this.transport.sendMail({
      from: { name: 'Stilewright sign-in', address: `sign-in@${this.domain}` },
      to,
      subject: `${code} ${SUBJECTS[purpose]}`,
      text: [
        `Your code is ${code}`,
        `${use}. It is good for 10 minutes and for you alone; nobody will ask you for it by telephone.`,
        'If you did not ask for a code, leave this mail as it is. Nobody gets in without the code.',
      ].join('\n\n'),
      headers: { 'Auto-Submitted': 'auto-generated' },
      disableFileAccess: true,
      disableUrlAccess: true,
    });
  }

  close(): void {
    this.transport.close();
  }
}
