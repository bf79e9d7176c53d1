import { useSyncExternalStore } from 'react';
import { breakpoints } from './tokens.ts';

export type Breakpoint = 'narrow' | 'wide' | 'office';

function read(): Breakpoint {
  if (window.matchMedia(`(min-width:${breakpoints.office}px)`).matches) return 'office';
  if (window.matchMedia(`(min-width:${breakpoints.wide}px)`).matches) return 'wide';
  return 'narrow';
}

function subscribe(onChange: () => void): () => void {
  const queries = Object.values(breakpoints).map((width) => window.matchMedia(`(min-width:${width}px)`));
  queries.forEach((query) => query.addEventListener('change', onChange));
  return () => queries.forEach((query) => query.removeEventListener('change', onChange));
}

/** `narrow` on the server and while hydrating, then the truth. For behaviour only: layout belongs to media queries. */
export function useBreakpoint(): Breakpoint {
  return useSyncExternalStore(subscribe, read, () => 'narrow');
}
