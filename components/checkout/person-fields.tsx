import { Controller, type Control } from 'react-hook-form';
import { View } from 'react-native';
import type { CheckoutForm } from '#shared/contracts/checkout-form-schema.ts';
import { css } from '#components/theme/css.ts';
import { Field } from '#components/ui/field.tsx';
import { Heading } from '#components/ui/heading.tsx';

const FIELDS = [
  { name: 'name', label: 'Name', autoComplete: 'name', inputMode: 'text', autoCapitalize: 'words' },
  {
    name: 'email',
    label: 'E-mail',
    autoComplete: 'email',
    inputMode: 'email',
    hint: 'For the confirmation and the link to your order.',
  },
  {
    name: 'phone',
    label: 'Phone',
    autoComplete: 'tel',
    inputMode: 'tel',
    hint: 'Only if something about your order changes.',
  },
  { name: 'note', label: 'A note for the packer', autoComplete: 'off', inputMode: 'text', optional: true },
] as const;

type PersonFieldsProps = { control: Control<CheckoutForm>; onEnter: () => void };

export function PersonFields({ control, onEnter }: PersonFieldsProps) {
  return (
    <View style={css('w-section')}>
      <Heading level={2}>About you</Heading>
      {FIELDS.map((about) => (
        <Controller
          key={about.name}
          control={control}
          name={about.name}
          render={({ field, fieldState }) => (
            <Field
              ref={field.ref}
              label={about.label}
              hint={'hint' in about ? about.hint : undefined}
              optional={'optional' in about}
              multiline={about.name === 'note'}
              autoComplete={about.autoComplete}
              inputMode={about.inputMode}
              {...('autoCapitalize' in about ? { autoCapitalize: about.autoCapitalize } : {})}
              value={field.value}
              onChangeText={field.onChange}
              onBlur={field.onBlur}
              {...(about.name === 'note' ? {} : { onSubmitEditing: onEnter })}
              error={fieldState.error?.message}
            />
          )}
        />
      ))}
    </View>
  );
}
