import { Pressable } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Icon, type IconName } from './icon.tsx';

type IconButtonProps = {
  icon: IconName;
  /** What it does, for screen readers and on hover. */
  name: string;
  onPress: () => void;
  disabled?: boolean;
};

export function IconButton({ icon, name, onPress, disabled = false }: IconButtonProps) {
  return (
    <Pressable
      role="button"
      aria-label={name}
      disabled={disabled}
      onPress={onPress}
      style={css('w-button', 'w-button-square', 'w-button-bare')}
    >
      <Icon name={icon} />
    </Pressable>
  );
}
