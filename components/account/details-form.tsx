import type { Control } from 'react-hook-form';
import { View } from 'react-native';
import type { MyDetailsEdit } from '#shared/contracts/account.ts';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { FormFrame } from '#components/ui/form-frame.tsx';
import { FormText } from '#components/ui/form-text.tsx';

type DetailsFormProps = { control: Control<MyDetailsEdit>; onSubmit: () => void; busy: boolean };

/** What the checkout fills in by itself. */
export function DetailsForm({ control, onSubmit, busy }: DetailsFormProps) {
  return (
    <FormFrame name="Your details" onSubmit={onSubmit}>
      <FormText control={control} name="name" label="Name" autoComplete="name" autoCapitalize="words" />
      <FormText
        control={control}
        name="phone"
        label="Phone"
        hint="Filled in at the checkout for you."
        autoComplete="tel"
        inputMode="tel"
        optional
      />
      <View style={css('w-buttons')}>
        <Button label="Save the details" busy={busy} onPress={onSubmit} />
      </View>
    </FormFrame>
  );
}
