import { Pressable, Text } from 'react-native';
import { Icon, type IconName } from './icon.tsx';
import { css } from '#components/theme/css.ts';

export type ButtonKind = 'primary' | 'quiet' | 'danger';

type ButtonProps = {
  label: string;
  onPress: () => void;
  /** One primary button a screen. */
  kind?: ButtonKind;
  /** While the work is under way: says so, keeps the keyboard's place, and takes no second press. */
  busy?: boolean;
  busyLabel?: string;
  disabled?: boolean;
  wide?: boolean;
  small?: boolean;
  icon?: IconName;
  /** The whole name for screen readers, when several buttons carry the same words. Starts with the words. */
  name?: string | undefined;
  expanded?: boolean;
  pressed?: boolean;
};

export function Button(props: ButtonProps) {
  const { label, onPress, kind = 'primary', busy = false, busyLabel = `${label} …`, disabled = false } = props;
  return (
    <Pressable
      role="button"
      disabled={disabled}
      onPress={() => {
        if (!busy) onPress();
      }}
      aria-label={props.name}
      aria-busy={busy}
      {...(props.expanded === undefined ? {} : { 'aria-expanded': props.expanded })}
      {...(props.pressed === undefined ? {} : { 'aria-pressed': props.pressed })}
      style={css('w-button', `w-button-${kind}`, props.wide && 'w-button-full', props.small && 'w-button-small')}
    >
      {props.icon ? <Icon name={props.icon} /> : null}
      <Text style={css('w-button-label')}>{busy ? busyLabel : label}</Text>
    </Pressable>
  );
}
