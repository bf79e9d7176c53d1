import type { ReactNode } from 'react';
import { Text as NativeText } from 'react-native';
import { css } from '#components/theme/css.ts';

export type Tone = 'plain' | 'quiet' | 'good' | 'waiting' | 'danger' | 'action';

export type TextProps = {
  children: ReactNode;
  size?: 'body' | 'lead' | 'small' | 'tiny';
  weight?: 'normal' | 'strong' | 'bold';
  tone?: Tone;
  align?: 'start' | 'centre' | 'end';
  /** Digits of one width, for columns and figures that change. */
  figures?: boolean;
  nowrap?: boolean;
  /** Keeps running text to a line length that reads well. */
  measure?: boolean;
  id?: string | undefined;
  /** `status` for news that a screen reader should speak when it has time, `alert` for what cannot wait. */
  live?: 'status' | 'alert' | undefined;
};

export function Text(props: TextProps) {
  const { size = 'body', weight = 'normal', tone = 'plain', align = 'start' } = props;
  return (
    <NativeText
      id={props.id}
      role={props.live}
      style={css(
        't-text',
        size !== 'body' && `t-${size}`,
        weight !== 'normal' && `t-${weight}`,
        tone !== 'plain' && `t-${tone}`,
        align !== 'start' && `t-${align}`,
        props.figures && 't-figures',
        props.nowrap && 't-nowrap',
        props.measure && 't-measure',
      )}
    >
      {props.children}
    </NativeText>
  );
}
