'use client';

import { useEffect } from 'react';

/** Says on the root element that the page has taken over from the server's markup (`data-ready="yes"`). */
export function ReadyMarker() {
  useEffect(() => {
    document.documentElement.dataset.ready = 'yes';
  }, []);
  return null;
}
