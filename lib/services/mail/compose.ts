import type { MailJob } from '@/lib/contracts/jobs';

/** The contractor in whose name a mail goes out. */
interface Sender {
  readonly name: string;
  readonly phone: string;
  readonly licence: string | null;
  readonly brand: { readonly light: string };
}

const ESCAPES: Readonly<Record<string, string>> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};
const escape = (text: string) => text.replace(/[&<>"']/g, (sign) => ESCAPES[sign] ?? sign);

const FONT = "font-family:'Atkinson Hyperlegible Next','Segoe UI',Helvetica,Arial,sans-serif";
const INK = '#23211d';
const QUIET = '#5d584f';

/** One mail in a contractor's brand, as plain text and as HTML that needs nothing from any server. */
export function composeMail(mail: MailJob, sender: Sender): { text: string; html: string } {
  const paragraphs = mail.text.split(/\n{2,}/).filter((one) => one.trim() !== '');
  const foot = [sender.name, sender.phone, sender.licence].filter((one) => one !== null).join(', ');
  const text = [
    `Dear ${mail.to.name},`,
    ...paragraphs,
    ...(mail.action ? [`${mail.action.label}:\n${mail.action.url}`] : []),
    foot,
  ].join('\n\n');

  const colour = /^#[0-9a-f]{6}$/i.test(sender.brand.light) ? sender.brand.light : INK;
  const paragraph = (inner: string) => `<p style="margin:0 0 16px">${inner}</p>`;
  const button = mail.action
    ? `<p style="margin:24px 0"><a href="${escape(mail.action.url)}" style="display:inline-block;padding:13px 22px;background:${colour};color:#ffffff;text-decoration:none;border-radius:2px;font-weight:600">${escape(mail.action.label)}</a></p>
<p style="margin:0 0 16px;font-size:14px;color:${QUIET}">If the button does not work, copy this address:<br><span style="word-break:break-all">${escape(mail.action.url)}</span></p>`
    : '';
  const html = `<!doctype html>
<html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width"><title>${escape(mail.subject)}</title></head>
<body style="margin:0;background:#f4f1ea;${FONT};font-size:17px;line-height:1.5;color:${INK}">
<table role="presentation" width="100%" cellpadding="0" cellspacing="0"><tr><td align="center" style="padding:24px 12px">
<table role="presentation" width="100%" cellpadding="0" cellspacing="0" style="max-width:560px;background:#fffdf8;border:1px solid #d9d3c6">
<tr><td style="padding:20px 28px;border-bottom:4px solid ${colour};font-size:20px;font-weight:700;color:${colour}">${escape(sender.name)}</td></tr>
<tr><td style="padding:28px">
${paragraph(`Dear ${escape(mail.to.name)},`)}
${paragraphs.map((one) => paragraph(escape(one).replaceAll('\n', '<br>'))).join('\n')}
${button}
</td></tr>
<tr><td style="padding:16px 28px;border-top:1px solid #d9d3c6;font-size:14px;color:${QUIET}">${escape(foot)}</td></tr>
</table></td></tr></table></body></html>
`;
  return { text: `${text}\n`, html };
}
