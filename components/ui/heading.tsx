import type { ReactNode } from 'react';
import { Text } from 'react-native';
import { css } from '#components/theme/css.ts';

type Look = 'display' | 'title' | 'section' | 'item' | 'sub';

const lookOfLevel = { 1: 'title', 2: 'section', 3: 'sub', 4: 'sub' } as const;

type HeadingProps = {
  level: 1 | 2 | 3 | 4;
  children: ReactNode;
  /** When the place in the outline and the size on the page differ; `display` is the one large line of a page. */
  look?: Look;
  id?: string | undefined;
};

export function Heading({ level, children, look = lookOfLevel[level], id }: HeadingProps) {
  return (
    <Text role="heading" aria-level={level} id={id} style={css(`t-${look}`)}>
      {children}
    </Text>
  );
}
