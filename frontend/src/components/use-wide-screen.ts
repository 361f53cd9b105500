import { useSyncExternalStore } from 'react';

const WIDE = '(min-width: 56.25rem)';

function subscribe(onChange: () => void): () => void {
  const query = window.matchMedia(WIDE);
  query.addEventListener('change', onChange);
  return () => query.removeEventListener('change', onChange);
}

/** Whether the page is wide enough for tables of a month; it is not under 900 px of usual text. */
export function useWideScreen(): boolean {
  return useSyncExternalStore(subscribe, () => window.matchMedia(WIDE).matches);
}
