import type { StoredMail } from './store';

const escape = (text: string) => text.replace(/[&<>"']/g, (sign) => `&#${sign.charCodeAt(0)};`);

const STYLE = `
@font-face { font-family: Reading; src: url(/fonts/reading.woff2) format('woff2'); font-weight: 200 800; }
@font-face { font-family: Title; src: url(/fonts/title.woff2) format('woff2'); font-weight: 200 800; }
:root { color-scheme: light dark; --ground: #E6E9E3; --panel: #F4F6F1; --ink: #17211D; --quiet: #4F5C55; --line: #B9C2BA; --brand: #0B5D63; }
@media (prefers-color-scheme: dark) {
  :root { --ground: #161B19; --panel: #1F2624; --ink: #E7ECE6; --quiet: #A3B0A8; --line: #3A4541; --brand: #5FB6BA; }
}
* { box-sizing: border-box; }
body { margin: 0; padding: 10px; background: var(--ground); color: var(--ink); font: 17px/26px Reading, sans-serif; }
.frame { display: grid; gap: 10px; max-width: 1060px; margin: 0 auto; }
.panel { background: var(--panel); border: 1px solid var(--line); border-radius: 2px; padding: 20px; min-width: 0; }
h1 { margin: 0; font: 600 32px/38px Title, sans-serif; }
h2 { margin: 0; font: 600 24px/30px Title, sans-serif; overflow-wrap: anywhere; }
p { margin: 8px 0 0; } .quiet { color: var(--quiet); font-size: 15px; line-height: 22px; }
a { color: var(--brand); text-underline-offset: 3px; }
a:focus-visible, select:focus-visible, button:focus-visible { outline: 2px solid var(--brand); outline-offset: 2px; }
form { display: flex; flex-wrap: wrap; gap: 12px; align-items: end; margin-top: 12px; }
label { display: grid; gap: 4px; font-size: 15px; line-height: 22px; color: var(--quiet); flex: 1 1 220px; max-width: 460px; }
select, button { font: inherit; min-height: 44px; padding: 8px 12px; color: var(--ink); background: var(--ground); border: 1px solid var(--line); border-radius: 2px; min-width: 0; width: 100%; }
button { width: auto; background: var(--ink); color: var(--panel); border-color: var(--ink); }
ul.mails { list-style: none; margin: 0; padding: 0; }
ul.mails > li + li { border-top: 1px solid var(--line); }
ul.mails a { display: grid; grid-template-columns: minmax(0, 1fr) auto; gap: 0 20px; padding: 12px 20px; color: inherit; text-decoration: none; }
ul.mails a:hover strong { text-decoration: underline; text-underline-offset: 3px; }
ul.mails strong { font-weight: 650; overflow-wrap: anywhere; } ul.mails span { color: var(--quiet); font-size: 15px; line-height: 22px; overflow-wrap: anywhere; }
ul.mails time { font-variant-numeric: tabular-nums; }
.flush { padding: 0; }
iframe { display: block; width: 100%; height: 55vh; border: 0; background: #fff; }
dl { display: grid; grid-template-columns: auto minmax(0, 1fr); gap: 2px 20px; margin: 12px 0 0; } dt { color: var(--quiet); } dd { margin: 0; overflow-wrap: anywhere; }
pre { margin: 0; white-space: pre-wrap; overflow-wrap: anywhere; font: inherit; }
@media (max-width: 600px) { body { padding: 6px; } .frame { gap: 6px; } ul.mails a { grid-template-columns: minmax(0, 1fr); } }
`;

function frame(title: string, body: string, head = ''): string {
  return `<!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1">
<title>${escape(title)}</title>${head}<style>${STYLE}</style></head><body><main class="frame">${body}</main></body></html>`;
}

/** In the reader's own zone would need a script; UTC is said instead. */
const when = (mail: StoredMail) =>
  `<time datetime="${escape(mail.receivedAt)}">${escape(mail.receivedAt.slice(0, 16).replace('T', ' '))} UTC</time>`;

export function listPage(mails: StoredMail[], recipients: string[], to: string): string {
  const option = (value: string, text: string) =>
    `<option value="${escape(value)}"${value === to.toLowerCase() ? ' selected' : ''}>${escape(text)}</option>`;
  const rows = mails.map(
    (mail) =>
      `<li><a href="/mail/${mail.id}"><strong>${escape(mail.subject || '(no subject)')}</strong><span>${when(mail)}</span>
<span>to ${escape(mail.to.join(', '))}</span><span>from ${escape(mail.from)}</span></a></li>`,
  );
  const nothing = `<div style="padding:20px">No mail${to ? ` to ${escape(to)}` : ''} yet. What the program sends appears here within ten seconds.</div>`;
  return frame(
    'Mailbox',
    `<header class="panel"><h1>Mailbox</h1><p class="quiet">Every mail that Stilewright sends on this machine ends here and goes nowhere else.</p>
<form method="get" action="/"><label>Recipient<select name="to">${option('', 'Everybody')}${recipients.map((address) => option(address, address)).join('')}</select></label><button>Show</button></form></header>
<section class="panel flush" aria-label="Mails, newest first">${rows.length > 0 ? `<ul class="mails">${rows.join('')}</ul>` : nothing}</section>`,
    '<meta http-equiv="refresh" content="10">',
  );
}

export function mailPage(mail: StoredMail): string {
  const linked = escape(mail.text).replace(
    /https?:\/\/(?:(?!&#(?:60|62|34|39);)[^\s<>])+/g,
    (url) => `<a href="${url}">${url}</a>`,
  );
  const attachments = mail.attachments
    .map((file, index) => `<a href="/mail/${mail.id}/attachment/${index}">${escape(file.filename)}</a>`)
    .join(', ');
  // Popups are allowed so that the links of a mail open; scripts and forms are not.
  const html =
    mail.html === null
      ? ''
      : `<section class="panel flush"><iframe title="The mail as sent" sandbox="allow-popups allow-popups-to-escape-sandbox" srcdoc="${escape(`<base target="_blank">${mail.html}`)}"></iframe></section>`;
  return frame(
    mail.subject,
    `<header class="panel"><a href="/?to=${encodeURIComponent(mail.to[0] ?? '')}">All mails to ${escape(mail.to[0] ?? 'this address')}</a>
<h2 style="margin-top:12px">${escape(mail.subject || '(no subject)')}</h2>
<dl><dt>To</dt><dd>${escape(mail.to.join(', '))}</dd><dt>From</dt><dd>${escape(mail.from)}</dd><dt>Received</dt><dd>${when(mail)}</dd>${attachments ? `<dt>Attached</dt><dd>${attachments}</dd>` : ''}</dl></header>
${html}<section class="panel"><p class="quiet" style="margin:0 0 8px">As plain text</p><pre>${linked || 'This mail has no plain text.'}</pre></section>`,
  );
}

export const notFoundPage = (): string =>
  frame(
    'Not found',
    '<section class="panel"><h1>Not found</h1><p>There is no such mail. <a href="/">All mails</a></p></section>',
  );
