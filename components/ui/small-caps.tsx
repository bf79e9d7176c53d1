import type { ReactNode } from 'react';
import { Text } from 'react-native';
import { css } from '#components/theme/css.ts';

/** A label above a heading, a list or a figure. `level` makes it a heading of the outline as well. */
export function SmallCaps({ children, level }: { children: ReactNode; level?: 2 | 3 | 4 }) {
  const heading = level ? { role: 'heading' as const, 'aria-level': level } : {};
  return (
    <Text {...heading} style={css('t-caps')}>
      {children}
    </Text>
  );
}
