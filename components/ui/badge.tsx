import { Text } from 'react-native';
import { css } from '#components/theme/css.ts';

type BadgeProps = {
  /** The fills of the rail: free is open and good, held waits, sold is done with; quiet is over or not begun. */
  kind: 'free' | 'held' | 'sold' | 'quiet';
  children: string;
};

/** A state in a word or two, with the mark of its fill. */
export function Badge({ kind, children }: BadgeProps) {
  return <Text style={css('w-badge', `w-badge-${kind}`)}>{children}</Text>;
}
