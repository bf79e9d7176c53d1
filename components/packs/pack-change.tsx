import { View } from 'react-native';
import type { Control } from 'react-hook-form';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { FormFrame } from '#components/ui/form-frame.tsx';
import { FormNumber } from '#components/ui/form-number.tsx';
import { SmallCaps } from '#components/ui/small-caps.tsx';
import { Text } from '#components/ui/text.tsx';
import type { Pack } from '#shared/contracts/packs.ts';
import { formatGrams } from '#shared/domain/words.ts';

const REASONS = ['dropped', 'torn', 'weighed twice', 'own use'] as const;
export type LossReason = (typeof REASONS)[number];

type PackChangeProps = {
  pack: Pack;
  control: Control<{ grams: number }>;
  busy: boolean;
  onReweigh: () => void;
  onLose: (reason: LossReason) => void;
};

/** One pack: weigh it again, or take it out of the day with the reason. */
export function PackChange({ pack, control, busy, onReweigh, onLose }: PackChangeProps) {
  return (
    <View style={css('w-stack')}>
      <Text>{`${pack.cut}, now ${formatGrams(pack.grams)}${pack.orderNo === null ? '' : `, in order ${pack.orderNo}`}.`}</Text>
      <FormFrame name="Weigh again" onSubmit={onReweigh}>
        <FormNumber control={control} name="grams" unit="kilograms" label="Weight now" width="full" />
        <Button label="Save the weight" wide busy={busy} onPress={onReweigh} />
      </FormFrame>
      <View style={css('w-stack-s', 'w-ruled')}>
        <SmallCaps>Take it out of the day</SmallCaps>
        <View style={css('w-row')}>
          {REASONS.map((reason) => (
            <Button
              key={reason}
              kind="danger"
              label={`It was ${reason === 'own use' ? 'kept for own use' : reason}`}
              onPress={() => onLose(reason)}
            />
          ))}
        </View>
      </View>
    </View>
  );
}
