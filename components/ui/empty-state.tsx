import type { ReactNode } from 'react';
import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Heading } from './heading.tsx';
import { Text } from './text.tsx';

type EmptyStateProps = {
  title: string;
  /** Why it is empty and what fills it. */
  words: string;
  /** The button or link that does. */
  children?: ReactNode;
  level?: 1 | 2 | 3;
};

/** An empty hook on the line: nothing hangs here yet. */
export function EmptyState({ title, words, children, level = 2 }: EmptyStateProps) {
  return (
    <View style={css('w-empty')}>
      <span className="w-empty-line" aria-hidden="true">
        <span className="w-hook" />
        <span className="w-hook" />
        <span className="w-hook" />
      </span>
      <Heading level={level} look="item">
        {title}
      </Heading>
      <Text tone="quiet" measure>
        {words}
      </Text>
      {children ? <View style={css('w-buttons')}>{children}</View> : null}
    </View>
  );
}
