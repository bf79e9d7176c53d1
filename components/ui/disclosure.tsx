import type { ReactNode } from 'react';
import { Icon } from './icon.tsx';

type DisclosureProps = {
  /** What is folded away. */
  words: string;
  open?: boolean;
  ruled?: boolean;
  children: ReactNode;
};

/** Folds away what not everybody needs; the browser's own element, so that searching in the page opens it. */
export function Disclosure({ words, open = false, ruled = false, children }: DisclosureProps) {
  return (
    <details open={open} className={ruled ? 'w-ruled' : undefined}>
      <summary className="w-nav-link" style={{ cursor: 'pointer', gap: 8 }}>
        <Icon name="down" size={16} />
        {words}
      </summary>
      {children}
    </details>
  );
}
