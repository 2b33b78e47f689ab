import { describe, expect, it } from 'vitest';
import { brandColours, brandStyle } from '@/components/portal/brand-colours';

/** Relative luminance and contrast as WCAG 2.2 writes them, worked here on their own. */
function luminance(hex: string): number {
  const [r = 0, g = 0, b = 0] = [1, 3, 5].map((at) => {
    const value = parseInt(hex.slice(at, at + 2), 16) / 255;
    return value <= 0.04045 ? value / 12.92 : ((value + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * r + 0.7152 * g + 0.0722 * b;
}

function contrast(a: string, b: string): number {
  const [high = 0, low = 0] = [luminance(a), luminance(b)].sort((x, y) => y - x);
  return (high + 0.05) / (low + 0.05);
}

const LIGHT_GROUNDS = ['#F4F6F1', '#E6E9E3'];
const DARK_GROUNDS = ['#1F2624', '#161B19'];

describe('a contractor’s colour', () => {
  it('the contrast worked here is the one of the standard: black on white is 21, #767676 on white 4.54', () => {
    expect(contrast('#000000', '#ffffff')).toBeCloseTo(21, 5);
    expect(contrast('#767676', '#ffffff')).toBeCloseTo(4.54, 2);
  });

  it.each([
    ['kingfisher', '#0B5D63', '#5FB6BA'],
    ['bark', '#7A3B1D', '#D79A75'],
    ['a yellow that cannot be read', '#FFD400', '#332A00'],
    ['white for both', '#FFFFFF', '#FFFFFF'],
    ['black for both', '#000000', '#000000'],
    ['a saturated blue', '#3B82F6', '#0000FF'],
  ])('%s can be read at 4.5 : 1 on every ground, and so can the text upon it', (_name, light, dark) => {
    const colours = brandColours({ light, dark });
    for (const ground of LIGHT_GROUNDS) expect(contrast(colours.light, ground)).toBeGreaterThanOrEqual(4.5);
    for (const ground of DARK_GROUNDS) expect(contrast(colours.dark, ground)).toBeGreaterThanOrEqual(4.5);
    expect(contrast(colours.light, colours.onLight)).toBeGreaterThanOrEqual(4.5);
    expect(contrast(colours.dark, colours.onDark)).toBeGreaterThanOrEqual(4.5);
  });

  it('a colour that can be read already is left as the contractor gave it', () => {
    const colours = brandColours({ light: '#0B5D63', dark: '#5FB6BA' });
    expect(colours.light.toLowerCase()).toBe('#0b5d63');
    expect(colours.dark.toLowerCase()).toBe('#5fb6ba');
  });

  it('nothing but colours reaches the style element, whatever is given', () => {
    const style = brandStyle(brandColours({ light: '</style><script>', dark: 'url(x)' }));
    expect(style).toMatch(/^:root\{(--[a-z-]+:#[0-9a-f]{6};?){4}\}$/);
  });
});
