// @vitest-environment jsdom
import { act } from 'react';
import { createRoot, type Root } from 'react-dom/client';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { OptionBand } from '@/components/choosing/option-band';
import type { Cents, OptionState } from '@/lib/engine/types';

Reflect.set(globalThis, 'IS_REACT_ACT_ENVIRONMENT', true);

const option = (id: string, more: Partial<OptionState> = {}): OptionState => ({
  id,
  name: id,
  chosen: false,
  availability: 'available',
  delta: 0 as Cents,
  swaps: [],
  ...more,
});

const OPTIONS: readonly OptionState[] = [
  option('Red oak', { chosen: true }),
  option('Cherry', { delta: 118_400 as Cents }),
  option('Maple', { delta: -31_000 as Cents }),
  option('Walnut', { availability: 'availableWithSwap', reason: 'Takes a clear finish.', delta: 5 as Cents }),
  option('Hickory', { availability: 'notAvailable', reason: 'Not with this door.', delta: null }),
];

let root: Root;
let host: HTMLElement;
const choose = vi.fn();
const ask = vi.fn();

function show(confirmed: boolean) {
  act(() =>
    root.render(
      <OptionBand
        label="Wood"
        options={OPTIONS}
        confirmed={confirmed}
        proposedBy="Rowan"
        picture={() => null}
        swapWords={() => 'with a clear finish'}
        onChoose={choose}
        onAsk={ask}
      />,
    ),
  );
}

const radios = (): HTMLElement[] => [...host.querySelectorAll<HTMLElement>('[role=radio]')];
const radio = (at: number): HTMLElement => {
  const found = radios()[at];
  if (!found) throw new Error(`There is no option ${at}.`);
  return found;
};
const press = (key: string) =>
  act(() => {
    document.activeElement?.dispatchEvent(new KeyboardEvent('keydown', { key, bubbles: true }));
  });

beforeEach(() => {
  host = document.body.appendChild(document.createElement('div'));
  root = createRoot(host);
  choose.mockClear();
  ask.mockClear();
});

afterEach(() => {
  act(() => root.unmount());
  host.remove();
});

describe('the band of options', () => {
  it('is one radio group with one tab stop, on what is chosen', () => {
    show(true);
    expect(host.querySelector('[role=radiogroup]')?.getAttribute('aria-label')).toBe('Wood');
    expect(radios().map((one) => one.tabIndex)).toEqual([0, -1, -1, -1, -1]);
    expect(radios().map((one) => one.getAttribute('aria-checked'))).toEqual([
      'true',
      'false',
      'false',
      'false',
      'false',
    ]);
  });

  it('says each difference in words beside arrow and sign', () => {
    show(true);
    expect(radio(1).textContent).toBe('Cherry,  + $1,184 more');
    expect(radio(2).textContent).toBe('Maple,  − $310 less');
    expect(radio(0).textContent).toContain('chosen');
    expect(radio(3).textContent).toContain('with a clear finish');
    expect(radio(4).textContent).toContain('Not with this door.');
  });

  it('names who proposes what nobody has decided yet', () => {
    show(false);
    expect(radio(0).textContent).toContain('Rowan proposes');
  });

  it('arrows move along and round the ends, and choose what is free to choose', () => {
    show(true);
    act(() => radio(0).focus());
    press('ArrowRight');
    expect(document.activeElement).toBe(radio(1));
    expect(choose).toHaveBeenLastCalledWith(OPTIONS[1]);
    press('ArrowDown');
    expect(choose).toHaveBeenLastCalledWith(OPTIONS[2]);
    press('Home');
    press('ArrowLeft');
    expect(document.activeElement).toBe(radio(4));
    expect(choose).toHaveBeenCalledTimes(2);
    expect(ask).not.toHaveBeenCalled();
  });

  it('passing over an option that needs a swap does not swap; pressing it does', () => {
    show(true);
    act(() => radio(2).focus());
    press('ArrowRight');
    expect(document.activeElement).toBe(radio(3));
    expect(choose).not.toHaveBeenCalled();
    act(() => radio(3).click());
    expect(choose).toHaveBeenCalledWith(OPTIONS[3]);
  });

  it('pressing what cannot be had asks why and chooses nothing', () => {
    show(true);
    expect(radio(4).getAttribute('aria-disabled')).toBe('true');
    act(() => radio(4).click());
    expect(ask).toHaveBeenCalledWith(OPTIONS[4]);
    expect(choose).not.toHaveBeenCalled();
  });
});
