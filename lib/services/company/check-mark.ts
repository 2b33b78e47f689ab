const ELEMENTS = new Set([
  'svg',
  'g',
  'path',
  'circle',
  'ellipse',
  'rect',
  'line',
  'polyline',
  'polygon',
  'title',
]);
const ATTRIBUTES =
  /^(xmlns|viewBox|width|height|d|cx|cy|r|rx|ry|x|y|x1|x2|y1|y2|points|transform|fill|stroke|fill-rule|clip-rule|stroke-(width|linecap|linejoin|miterlimit)|opacity|role|aria-hidden)$/;
const BYTES_MAX = 20_000;

/**
 * Whether text is one plain SVG drawing and nothing that could act, load or style: known shapes, known attributes,
 * no addresses but the name space.
 */
export function isPlainMark(svg: string): boolean {
  const text = svg.trim();
  if (text.length > BYTES_MAX || !/^<svg[\s>]/.test(text) || !text.endsWith('</svg>')) return false;
  if (/<[!?]|&/.test(text)) return false;
  const tag = /<(\/?)([A-Za-z]+)((?:\s+[A-Za-z:-]+="[^"<>]*")*)\s*(\/?)>/g;
  const open: string[] = [];
  let end = 0;
  for (const match of text.matchAll(tag)) {
    const [whole, closing, name = '', attributes = '', alone] = match;
    // Between tags only text without any mark-up may stand.
    if (/[<>]/.test(text.slice(end, match.index)) || !ELEMENTS.has(name)) return false;
    end = match.index + whole.length;
    if (closing) {
      if (open.pop() !== name) return false;
      continue;
    }
    for (const [, attribute = '', value = ''] of attributes.matchAll(/([A-Za-z:-]+)="([^"]*)"/g)) {
      if (!ATTRIBUTES.test(attribute)) return false;
      if (attribute !== 'xmlns' && /url\(|:|\/\//i.test(value)) return false;
    }
    if (!alone) open.push(name);
  }
  return end === text.length && open.length === 0;
}
