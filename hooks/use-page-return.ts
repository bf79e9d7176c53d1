import { useEffect } from 'react';

/** Calls back when the browser shows this page again just as it was left, as the back button often does. */
export function usePageReturn(onReturn: () => void): void {
  useEffect(() => {
    const shown = (event: PageTransitionEvent) => {
      if (event.persisted) onReturn();
    };
    window.addEventListener('pageshow', shown);
    return () => window.removeEventListener('pageshow', shown);
  }, [onReturn]);
}
