import type { Appearance } from '@stripe/stripe-js';

const token = (name: string, otherwise: string): string =>
  getComputedStyle(document.documentElement).getPropertyValue(name).trim() || otherwise;

/** The card form in the contractor's colours and the page's own forms, read from the page as it is now. */
export function readAppearance(): Appearance {
  const ink = token('--ink', '#17211d');
  const quiet = token('--ink-quiet', '#4f5c55');
  const panel = token('--panel', '#f4f6f1');
  const brand = token('--brand', '#0b5d63');
  const more = token('--more', '#8c2f1b');
  return {
    theme: 'flat',
    labels: 'above',
    variables: {
      colorPrimary: brand,
      colorBackground: panel,
      colorText: ink,
      colorTextSecondary: quiet,
      colorTextPlaceholder: quiet,
      colorDanger: more,
      fontFamily: "'Atkinson Hyperlegible Next', 'Atkinson Hyperlegible', system-ui, sans-serif",
      fontSizeBase: '17px',
      fontSizeSm: '15px',
      borderRadius: '2px',
      spacingUnit: '4px',
    },
    rules: {
      '.Input': { border: `1px solid ${quiet}`, boxShadow: 'none', padding: '12px', minHeight: '48px' },
      '.Input:focus': {
        border: `1px solid ${ink}`,
        outline: `2px solid ${brand}`,
        outlineOffset: '1px',
        boxShadow: 'none',
      },
      '.Input--invalid': { border: `1px solid ${more}`, color: ink },
      '.Label': { color: ink, fontWeight: '600' },
    },
  };
}
