import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Select } from '#components/ui/select.tsx';
import type { WeighingDepth } from './weights-form.tsx';

const depths = [
  { value: 'quarters', label: 'carcase, side and quarters' },
  { value: 'primals', label: 'primals' },
  { value: 'cuts', label: 'primals and what is cut from them' },
] as const satisfies readonly { value: WeighingDepth; label: string }[];

const sides = [
  { value: 'left', label: 'left' },
  { value: 'right', label: 'right' },
] as const;

type WeighingChoiceProps = {
  side: 'left' | 'right';
  depth: WeighingDepth;
  onSide: (side: 'left' | 'right') => void;
  onDepth: (depth: WeighingDepth) => void;
};

/** Which side lies on the scale, and how far it is cut down. */
export function WeighingChoice({ side, depth, onSide, onDepth }: WeighingChoiceProps) {
  return (
    <View style={css('w-fields')}>
      <Select
        label="Side on the scale"
        value={side}
        options={sides}
        onChange={(value) => onSide(value === 'right' ? 'right' : 'left')}
      />
      <Select
        label="Weighed are"
        value={depth}
        options={depths}
        onChange={(value) => onDepth(depths.find((one) => one.value === value)?.value ?? 'quarters')}
      />
    </View>
  );
}
