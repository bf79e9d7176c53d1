import { View } from 'react-native';
import type { Control } from 'react-hook-form';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { FormFrame } from '#components/ui/form-frame.tsx';
import { FormNumber } from '#components/ui/form-number.tsx';
import type { Weights } from './weights-form.tsx';

type LiveWeightFormProps = { control: Control<Weights>; onSubmit: () => void; busy: boolean };

/** The beast on the scale once more before it goes: all estimates follow from it until the kill sheet is there. */
export function LiveWeightForm({ control, onSubmit, busy }: LiveWeightFormProps) {
  return (
    <FormFrame name="Live weight" onSubmit={onSubmit}>
      <FormNumber control={control} name="weights.0.grams" unit="kilograms" label="Live weight" />
      <View style={css('w-buttons')}>
        <Button kind="quiet" label="Save the live weight" busy={busy} onPress={onSubmit} />
      </View>
    </FormFrame>
  );
}
