import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { IconButton } from './icon-button.tsx';

type StepperProps = {
  /** What is counted, as in `Hearth, 5 kg`: names the group and its buttons. */
  label: string;
  value: number;
  onChange: (value: number) => void;
  min?: number;
  max?: number;
};

export function Stepper({ label, value, onChange, min = 0, max = 99 }: StepperProps) {
  return (
    <View role="group" aria-label={label} style={css('w-stepper')}>
      <IconButton
        icon="minus"
        name={`One fewer: ${label}`}
        disabled={value <= min}
        onPress={() => onChange(Math.max(min, value - 1))}
      />
      <output className="w-stepper-value" aria-live="polite">
        {value}
      </output>
      <IconButton
        icon="plus"
        name={`One more: ${label}`}
        disabled={value >= max}
        onPress={() => onChange(Math.min(max, value + 1))}
      />
    </View>
  );
}
