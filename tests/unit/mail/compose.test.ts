// @vitest-environment jsdom
import { describe, expect, it } from 'vitest';
import type { MailJob } from '@/lib/contracts/jobs';
import { composeMail } from '@/lib/services/mail/compose';

const sender = {
  name: 'Tern Hollow & Daughters',
  phone: '(413) 555-0142',
  licence: null,
  brand: { light: '#0b5d63' },
};
const mail: MailJob = {
  companyId: '00000000-0000-4000-8000-000000000000',
  to: { name: 'Mara "<script>alert(1)</script>"', email: 'mara@winslade.example' },
  subject: 'A <title> & more',
  text: 'First <i>paragraph</i>.\n\nSecond,\nwith a second line.\n\n',
  action: { label: 'Open <it>', url: 'http://localhost:4300/a?b=1&c="2"' },
};

describe('a mail', () => {
  const { text, html } = composeMail(mail, sender);
  const page = new DOMParser().parseFromString(html, 'text/html');

  it('says the same as text and as HTML, with one link', () => {
    const read = page.body.textContent ?? '';
    for (const words of [
      'First <i>paragraph</i>.',
      'with a second line.',
      'Tern Hollow & Daughters, (413) 555-0142',
    ]) {
      expect(text).toContain(words);
      expect(read).toContain(words);
    }
    expect([...page.querySelectorAll('a')].map((link) => link.getAttribute('href'))).toEqual([
      mail.action?.url,
    ]);
    expect(text).toContain(mail.action?.url);
  });

  it('turns nothing that somebody typed into mark-up, and loads nothing', () => {
    expect(page.querySelectorAll('script, i, img, link, style, iframe')).toHaveLength(0);
    expect(page.title).toBe(mail.subject);
    expect(html).not.toMatch(/url\(/);
  });

  it('stands in the contractor’s colour, and in ink when that is none', () => {
    expect(html).toContain('#0b5d63');
    const odd = composeMail(mail, { ...sender, brand: { light: 'red;background:url(x)' } });
    expect(odd.html).not.toContain('url(x)');
  });
});
