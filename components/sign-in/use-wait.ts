'use client';

import { useCallback, useEffect, useState } from 'react';

/** Seconds still to wait, counted down, and a way to begin a wait of so many seconds. */
export function useWait(first: number): [number, (seconds: number) => void] {
  const [until, setUntil] = useState<number | null>(null);
  const [left, setLeft] = useState(first);
  const begin = useCallback((seconds: number) => {
    setUntil(Date.now() + seconds * 1000);
    setLeft(seconds);
  }, []);
  useEffect(() => {
    const end = until ?? Date.now() + first * 1000;
    const timer = setInterval(() => {
      const seconds = Math.max(0, Math.ceil((end - Date.now()) / 1000));
      setLeft(seconds);
      if (seconds === 0) clearInterval(timer);
    }, 1000);
    return () => clearInterval(timer);
  }, [until, first]);
  return [left, begin];
}
