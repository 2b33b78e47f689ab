import type { Config } from 'tailwindcss';

/** Names for the variables of app/globals.css; sizes are px/line as the type scale sets them. */
const config: Config = {
  content: ['./app/**/*.{ts,tsx}', './components/**/*.{ts,tsx}'],
  theme: {
    extend: {
      colors: {
        plaster: 'var(--plaster)',
        panel: 'var(--panel)',
        ink: 'var(--ink)',
        quiet: 'var(--ink-quiet)',
        hairline: 'var(--hairline)',
        brand: 'var(--brand)',
        'on-brand': 'var(--on-brand)',
        more: 'var(--more)',
        less: 'var(--less)',
        caution: 'var(--caution)',
        'caution-ground': 'var(--caution-ground)',
        case: 'var(--case)',
        'on-case': 'var(--on-case)',
        blade: 'var(--blade)',
        'on-blade': 'var(--on-blade)',
      },
      fontFamily: {
        title: ['var(--font-title)', 'var(--font-title-ext)', 'system-ui', 'sans-serif'],
        reading: ['var(--font-reading)', 'var(--font-reading-ext)', 'system-ui', 'sans-serif'],
        mono: ['var(--font-mono)', 'var(--font-mono-ext)', 'ui-monospace', 'monospace'],
      },
      fontSize: {
        note: ['0.875rem', '1.25rem'],
        label: ['1rem', '1.3125rem'],
        reading: ['1.0625rem', '1.625rem'],
        price: ['1.125rem', '1.5rem'],
        lead: ['1.25rem', '1.75rem'],
        part: ['1.5rem', '1.875rem'],
        page: ['2rem', '2.375rem'],
        tape: ['2.75rem', '3rem'],
      },
      borderRadius: { frame: '2px' },
      spacing: { frame: 'var(--reveal)', target: '2.75rem' },
      transitionDuration: { swap: '160ms' },
    },
  },
};

export default config;
