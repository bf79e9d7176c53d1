import { useController, type Control } from 'react-hook-form';
import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { Field } from '#components/ui/field.tsx';
import { FormCheckbox } from '#components/ui/form-checkbox.tsx';
import { FormFrame } from '#components/ui/form-frame.tsx';
import { FormNumber } from '#components/ui/form-number.tsx';
import { FormText } from '#components/ui/form-text.tsx';
import { Select } from '#components/ui/select.tsx';
import type { DeliveryAreaEdit } from '#shared/contracts/delivery.ts';

type AreaFormProps = { control: Control<DeliveryAreaEdit>; onSubmit: () => void; busy: boolean; doLabel: string };

export const WEEKDAYS = ['Monday', 'Tuesday', 'Wednesday', 'Thursday', 'Friday', 'Saturday', 'Sunday'] as const;

/** Where the van goes, on which day after the cutting, and for how much. */
export function AreaForm({ control, onSubmit, busy, doLabel }: AreaFormProps) {
  return (
    <FormFrame name="Delivery area" onSubmit={onSubmit}>
      <FormText control={control} name="name" label="Name" hint="As the round is called on the run sheet." />
      <Prefixes control={control} />
      <View style={css('w-fields')}>
        <FormNumber control={control} name="pricePence" unit="pounds" label="Price" />
        <FormNumber control={control} name="freeFromPence" unit="pounds" label="Free from" optional />
      </View>
      <View style={css('w-fields')}>
        <Weekday control={control} />
        <FormText control={control} name="startsAt" label="From" width="short" />
        <FormText control={control} name="endsAt" label="To" width="short" />
        <FormNumber control={control} name="capacity" unit="count" label="Stops a round" />
      </View>
      <FormCheckbox control={control} name="isActive" label="The van goes there" />
      <View style={css('w-buttons')}>
        <Button label={doLabel} busy={busy} onPress={onSubmit} />
      </View>
    </FormFrame>
  );
}

/** One field for all of them, as people list them: ZZ1, ZZ2. */
function Prefixes({ control }: Pick<AreaFormProps, 'control'>) {
  const { field, fieldState, formState } = useController({ control, name: 'prefixes' });
  const error = fieldState.error;
  const first = Array.isArray(error) ? (error as { message?: string }[]).find(Boolean) : error;
  return (
    <Field
      label="Postcodes"
      hint="Letters or districts, such as ZZ or ZZ1, with commas between them."
      value={field.value.join(', ')}
      onChangeText={(text) => field.onChange(text.split(',').map((each) => each.trimStart()))}
      onBlur={() => {
        field.onChange(field.value.map((each) => each.trim()).filter(Boolean));
        field.onBlur();
      }}
      error={fieldState.isTouched || formState.isSubmitted ? first?.message : undefined}
    />
  );
}

function Weekday({ control }: Pick<AreaFormProps, 'control'>) {
  const { field } = useController({ control, name: 'weekday' });
  return (
    <Select
      label="Day"
      value={String(field.value)}
      options={WEEKDAYS.map((label, at) => ({ value: String(at + 1), label }))}
      onChange={(value) => field.onChange(Number(value))}
    />
  );
}
