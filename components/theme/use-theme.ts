import { useSyncExternalStore } from 'react';

export type SchemeChoice = 'device' | 'light' | 'dark';

const STORE = 'scheme';
const listeners = new Set<() => void>();

/** Runs in the head before the first paint, so that a chosen scheme does not flash. */
export const schemeScript = `try{var s=localStorage.getItem('${STORE}');if(s==='light'||s==='dark')document.documentElement.dataset.scheme=s}catch(e){}`;

function read(): SchemeChoice {
  const chosen = document.documentElement.dataset.scheme;
  return chosen === 'light' || chosen === 'dark' ? chosen : 'device';
}

function choose(choice: SchemeChoice): void {
  const root = document.documentElement;
  if (choice === 'device') delete root.dataset.scheme;
  else root.dataset.scheme = choice;
  try {
    if (choice === 'device') localStorage.removeItem(STORE);
    else localStorage.setItem(STORE, choice);
  } catch {
    // Storage is refused in some private windows: the choice then lasts as long as the page.
  }
  listeners.forEach((tell) => tell());
}

function subscribe(onChange: () => void): () => void {
  listeners.add(onChange);
  return () => listeners.delete(onChange);
}

/** The scheme that the reader chose, and how to choose. Colours themselves need no hook: they are CSS variables. */
export function useTheme(): { choice: SchemeChoice; choose: (choice: SchemeChoice) => void } {
  return { choice: useSyncExternalStore(subscribe, read, () => 'device'), choose };
}
