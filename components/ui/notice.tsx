import type { ReactNode } from 'react';
import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Text } from './text.tsx';

type NoticeProps = {
  /** `held`: something waits or is not certain yet. `error`: it did not work. */
  kind?: 'info' | 'good' | 'held' | 'error';
  /** What happened. */
  title: string;
  /** What was kept: nothing is worse than not knowing whether it has to be typed again. */
  kept?: string | undefined;
  /** What to do next. */
  next?: string | undefined;
  /** A button or a link that does it. */
  children?: ReactNode;
  /** Spoken as soon as it appears. Errors always are. */
  spoken?: boolean;
};

export function Notice({ kind = 'info', title, kept, next, children, spoken = false }: NoticeProps) {
  const role = kind === 'error' ? 'alert' : spoken ? 'status' : 'note';
  return (
    <View role={role} style={css('w-notice')}>
      <span className={`w-notice-bar w-notice-${kind}`} aria-hidden="true" />
      <View style={css('w-notice-words')}>
        <Text weight="bold" tone={kind === 'error' ? 'danger' : kind === 'held' ? 'waiting' : 'plain'}>
          {title}
        </Text>
        {kept ? <Text>{kept}</Text> : null}
        {next ? <Text>{next}</Text> : null}
        {children ? <View style={css('w-notice-do')}>{children}</View> : null}
      </View>
    </View>
  );
}
