import { useState } from 'react';
import { useController, type Control } from 'react-hook-form';
import { Button } from '#components/ui/button.tsx';
import { Field } from '#components/ui/field.tsx';
import { FormFrame } from '#components/ui/form-frame.tsx';
import { FormText } from '#components/ui/form-text.tsx';

export type Application = { businessName: string; addressLines: string[]; phone: string };

type ApplyFormProps = { control: Control<Application>; onSubmit: () => void; busy: boolean; submitLabel: string };

export function ApplyForm({ control, onSubmit, busy, submitLabel }: ApplyFormProps) {
  return (
    <FormFrame name="Trade account" onSubmit={onSubmit}>
      <FormText control={control} name="businessName" label="Name of the business" autoComplete="organization" />
      <AddressField control={control} />
      <FormText control={control} name="phone" label="Telephone" inputMode="tel" autoComplete="tel" />
      <Button label={submitLabel} wide busy={busy} busyLabel="Sending …" onPress={onSubmit} />
    </FormFrame>
  );
}

/** Written as on an envelope, kept line by line. */
function AddressField({ control }: { control: Control<Application> }) {
  const { field, fieldState } = useController({ control, name: 'addressLines' });
  const [text, setText] = useState(() => field.value.join('\n'));
  const error = fieldState.error as { message?: string; root?: { message?: string } } | undefined;
  return (
    <Field
      label="Address"
      hint="One line under the other, the postcode last."
      multiline
      autoComplete="street-address"
      value={text}
      onChangeText={(next) => {
        setText(next);
        field.onChange(
          next
            .split('\n')
            .map((line) => line.trim())
            .filter(Boolean),
        );
      }}
      onBlur={field.onBlur}
      error={
        error &&
        (field.value.length === 0 ? 'This is needed.' : (error.root?.message ?? 'At most six lines of 120 characters.'))
      }
    />
  );
}
