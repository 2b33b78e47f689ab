'use client';

import { useEffect, useRef, type RefObject } from 'react';
import type { Problem } from './problem';

/** A ref for a form: when a field was refused, that field gets the focus, so that its fault is read out. */
export function useFaultFocus(problem: Problem | null): RefObject<HTMLFormElement | null> {
  const form = useRef<HTMLFormElement>(null);
  useEffect(() => {
    if (!problem?.field) return;
    const field = form.current?.querySelector<HTMLInputElement>('[aria-invalid="true"]');
    field?.focus();
    field?.select();
  }, [problem]);
  return form;
}
