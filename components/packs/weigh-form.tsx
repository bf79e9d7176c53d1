import { useEffect, useRef } from 'react';
import type { TextInput } from 'react-native';
import { View } from 'react-native';
import { useWatch, type Control } from 'react-hook-form';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { FormFrame } from '#components/ui/form-frame.tsx';
import { FormNumber } from '#components/ui/form-number.tsx';
import { FormSelect } from '#components/ui/form-select.tsx';
import { Text } from '#components/ui/text.tsx';
import type { PackingDay } from '#shared/contracts/packs.ts';
import { formatWeight } from '#shared/domain/words.ts';
import { nameCarcase } from './fill-words.ts';

export type NewPacks = { carcaseId: string; cutId: string; grams: number[] };

type WeighFormProps = {
  control: Control<NewPacks>;
  day: PackingDay;
  onSubmit: () => void;
  busy: boolean;
  /** Rises with each pack that was saved: the keyboard goes back to the weight. */
  saved: number;
};

/** One pack after another: what it is once, then weight and Enter, weight and Enter. */
export function WeighForm({ control, day, onSubmit, busy, saved }: WeighFormProps) {
  const input = useRef<TextInput>(null);
  const [carcaseId, cutId, [grams]] = useWatch({ control, name: ['carcaseId', 'cutId', 'grams'] });
  useEffect(() => {
    // React Native Web takes the focus away after Enter, on the next turn; this comes after it.
    if (saved > 0) setTimeout(() => input.current?.focus());
  }, [saved]);
  const lines = day.cuttingList.filter((line) => line.carcaseId === carcaseId);
  const line = lines.find((one) => one.cutId === cutId);
  const isUnusual = line && grams ? grams < line.minPackGrams || grams > line.maxPackGrams : false;
  return (
    <FormFrame name="Weigh packs" onSubmit={onSubmit}>
      <View style={css('w-fields')}>
        <FormSelect
          control={control}
          name="carcaseId"
          label="From carcase"
          placeholder="Choose one"
          options={day.carcases.map((carcase) => ({ value: carcase.id, label: nameCarcase(carcase) }))}
        />
        <FormSelect
          control={control}
          name="cutId"
          label="Cut"
          placeholder="Choose one"
          options={lines.map((one) => ({ value: one.cutId, label: one.cut }))}
        />
      </View>
      <FormNumber
        ref={input}
        control={control}
        name="grams.0"
        unit="kilograms"
        label="Weight of the pack"
        width="full"
        hint={line ? `Usually ${formatWeight(line.minPackGrams)} to ${formatWeight(line.maxPackGrams)}.` : undefined}
        enterKeyHint="done"
      />
      {isUnusual ? (
        <Text tone="waiting" weight="strong" live="status">
          This is not a usual weight for this cut. Look at the scale again.
        </Text>
      ) : null}
      <Button label="Save the pack" wide busy={busy} busyLabel="Saving …" onPress={onSubmit} />
    </FormFrame>
  );
}
