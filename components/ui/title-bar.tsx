import type { ReactNode } from 'react';
import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Heading } from './heading.tsx';
import { SmallCaps } from './small-caps.tsx';
import { TextLink, type Destination } from './text-link.tsx';
import { Text } from './text.tsx';

type TitleBarProps = {
  title: string;
  /** The line of small caps above: which day, how many, how heavy. */
  above?: string | undefined;
  lead?: string | undefined;
  /** The buttons of the screen, its one red one last. */
  actions?: ReactNode;
  look?: 'display' | 'title';
  /** The screen that this one belongs to. */
  back?: Destination & { label: string };
};

/** The head of a screen. */
export function TitleBar({ title, above, lead, actions, look = 'title', back }: TitleBarProps) {
  const bar = (
    <View style={css('w-titlebar')}>
      <View style={css('w-titlebar-words')}>
        {above ? <SmallCaps>{above}</SmallCaps> : null}
        <Heading level={1} look={look}>
          {title}
        </Heading>
        {lead ? (
          <Text size="lead" tone="quiet" measure>
            {lead}
          </Text>
        ) : null}
      </View>
      {actions ? <View style={css('w-titlebar-do')}>{actions}</View> : null}
    </View>
  );
  if (!back) return bar;
  const { label, ...destination } = back;
  return (
    <View>
      <TextLink {...destination} place="alone" icon="back">
        {label}
      </TextLink>
      {bar}
    </View>
  );
}
