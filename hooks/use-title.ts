import { useEffect } from 'react';

/** The title of the first page comes with its HTML; this one is for walking on to others without a reload. */
export function useTitle(title: string | undefined): void {
  useEffect(() => {
    if (title) document.title = title;
  }, [title]);
}
