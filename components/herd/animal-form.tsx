import { View } from 'react-native';
import type { Control } from 'react-hook-form';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { FormDay } from '#components/ui/form-day.tsx';
import { FormFrame } from '#components/ui/form-frame.tsx';
import { FormNumber } from '#components/ui/form-number.tsx';
import { FormSelect } from '#components/ui/form-select.tsx';
import { FormText } from '#components/ui/form-text.tsx';
import type { NewAnimal, Sex } from '#shared/contracts/herd.ts';

const sexes = ['steer', 'heifer', 'young bull', 'cow'] as const satisfies readonly Sex[];

type AnimalFormProps = {
  control: Control<NewAnimal>;
  onSubmit: () => void;
  busy: boolean;
  submitLabel: string;
};

/** What the passport says, and the last live weight. */
export function AnimalForm({ control, onSubmit, busy, submitLabel }: AnimalFormProps) {
  return (
    <FormFrame name="Animal" onSubmit={onSubmit}>
      <FormText
        control={control}
        name="earTag"
        label="Ear tag"
        hint="UK, six digits of the herd, then six of the animal. The check digit is verified."
        autoCapitalize="characters"
      />
      <View style={css('w-fields')}>
        <FormText control={control} name="breed" label="Breed" autoCapitalize="words" />
        <FormSelect
          control={control}
          name="sex"
          label="Sex"
          options={sexes.map((sex) => ({ value: sex, label: sex }))}
        />
      </View>
      <View style={css('w-fields')}>
        <FormDay control={control} name="born" label="Born" />
        <FormNumber control={control} name="liveGrams" unit="kilograms" label="Live weight" optional />
      </View>
      <FormText
        control={control}
        name="damEarTag"
        label="Ear tag of the dam"
        optional
        emptyIsNull
        autoCapitalize="characters"
      />
      <View style={css('w-buttons')}>
        <Button label={submitLabel} busy={busy} onPress={onSubmit} />
      </View>
    </FormFrame>
  );
}
