import { View } from 'react-native';
import type { Control } from 'react-hook-form';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { FormDay } from '#components/ui/form-day.tsx';
import { FormFrame } from '#components/ui/form-frame.tsx';
import { FormNumber } from '#components/ui/form-number.tsx';
import { FormSelect } from '#components/ui/form-select.tsx';
import { FormText } from '#components/ui/form-text.tsx';
import type { KillSheet } from '#shared/contracts/carcases.ts';

type KillSheetFormProps = {
  control: Control<KillSheet>;
  conformations: readonly string[];
  fatClasses: readonly string[];
  onSubmit: () => void;
  busy: boolean;
};

const optionsOf = (values: readonly string[]) => values.map((value) => ({ value, label: value }));

/** What the abattoir printed. A hot weight is taken 2 % down to cold. */
export function KillSheetForm({ control, conformations, fatClasses, onSubmit, busy }: KillSheetFormProps) {
  return (
    <FormFrame name="Kill sheet" onSubmit={onSubmit}>
      <FormDay control={control} name="killDay" label="Kill day" />
      <View style={css('w-fields')}>
        <FormNumber control={control} name="grams" unit="kilograms" label="Weight, both sides" />
        <FormNumber control={control} name="leftGrams" unit="kilograms" label="Left side" optional />
        <FormNumber control={control} name="rightGrams" unit="kilograms" label="Right side" optional />
        <FormSelect
          control={control}
          name="weighedAs"
          label="Weighed"
          width="short"
          options={[
            { value: 'hot', label: 'hot' },
            { value: 'cold', label: 'cold' },
          ]}
        />
      </View>
      <View style={css('w-fields')}>
        <FormSelect
          control={control}
          name="conformation"
          label="Conformation"
          optional
          width="short"
          placeholder="Not given"
          options={optionsOf(conformations)}
        />
        <FormSelect
          control={control}
          name="fatClass"
          label="Fat class"
          optional
          width="short"
          placeholder="Not given"
          options={optionsOf(fatClasses)}
        />
      </View>
      <FormText control={control} name="dressingSpec" label="Dressing specification" optional emptyIsNull />
      <View style={css('w-buttons')}>
        <Button label="Save the kill sheet" busy={busy} onPress={onSubmit} />
      </View>
    </FormFrame>
  );
}
