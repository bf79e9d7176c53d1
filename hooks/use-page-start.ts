import { useEffect, useRef } from 'react';

/** Walking on to another page starts at its top and moves the reader there; going back leaves them where they were. */
export function usePageStart(path: string): void {
  const former = useRef(path);
  const isBack = useRef(false);
  useEffect(() => {
    const noteBack = () => {
      isBack.current = true;
    };
    window.addEventListener('popstate', noteBack);
    return () => window.removeEventListener('popstate', noteBack);
  }, []);
  useEffect(() => {
    if (former.current === path) return;
    former.current = path;
    if (!isBack.current) {
      window.scrollTo(0, 0);
      document.getElementById('main')?.focus({ preventScroll: true });
    }
    isBack.current = false;
  }, [path]);
}
