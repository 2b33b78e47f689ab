import { describe, expect, it } from 'vitest';
import { QUILLBACK, TERN_HOLLOW } from '@/db/seed/demo';
import { isPlainMark } from '@/lib/services/company/check-mark';

const svg = (inner: string) => `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 8 8">${inner}</svg>`;

describe('a contractor’s mark', () => {
  it.each([
    svg('<path d="M0 0 L8 8" stroke="currentColor" stroke-width="2"/>'),
    svg('<g fill="#0b5d63"><circle cx="4" cy="4" r="2"/><title>A mark</title></g>'),
    TERN_HOLLOW.brand.markSvg ?? '',
    QUILLBACK.brand.markSvg ?? '',
  ])('that is a plain drawing is taken', (mark) => {
    expect(isPlainMark(mark)).toBe(true);
  });

  // The ways by which an inline SVG can act, load or style, as the SVG 2 and HTML standards give them.
  it.each([
    ['a script', svg('<script>alert(1)</script>')],
    ['an event handler', svg('<path d="M0 0" onload="alert(1)"/>')],
    ['a handler on the root', '<svg viewBox="0 0 8 8" onload="alert(1)"></svg>'],
    ['foreign mark-up', svg('<foreignObject><div/></foreignObject>')],
    ['an image from elsewhere', svg('<image href="https://elsewhere.example/a.png"/>')],
    ['a link', svg('<a href="javascript:alert(1)"><path d="M0 0"/></a>')],
    ['a reference', svg('<use href="#x"/>')],
    ['a style sheet', svg('<style>*{fill:red}</style>')],
    ['a style attribute', svg('<path d="M0 0" style="fill:url(//elsewhere.example)"/>')],
    ['a paint from elsewhere', svg('<path d="M0 0" fill="url(https://elsewhere.example/a.svg#b)"/>')],
    ['an animation', svg('<animate attributeName="href" to="javascript:alert(1)"/>')],
    ['an entity', '<!DOCTYPE svg [<!ENTITY x "y">]><svg viewBox="0 0 8 8"></svg>'],
    ['a comment', svg('<!-- --><path d="M0 0"/>')],
    ['a character reference', svg('<path d="M0 0" fill="&#106;avascript:"/>')],
    ['an unclosed tag', svg('<g>')],
    ['a second root', `${svg('')}<script>alert(1)</script></svg>`],
    ['an attribute without quotes', svg('<path d=M0 onload=alert(1)>')],
    ['something else', '<div></div>'],
    ['too much', svg(`<title>${'x'.repeat(20_000)}</title>`)],
  ])('with %s is refused', (_, mark) => {
    expect(isPlainMark(mark)).toBe(false);
  });
});
