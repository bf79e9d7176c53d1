import type { ComponentProps } from 'react';
import { useController, type Control, type FieldPath, type FieldValues } from 'react-hook-form';
import { NumberField } from './number-field.tsx';
import { shownError } from './shown-error.ts';

type FormNumberProps<Values extends FieldValues> = Omit<
  ComponentProps<typeof NumberField>,
  'value' | 'onChange' | 'onBlur' | 'error'
> & { control: Control<Values>; name: FieldPath<Values> };

/** A figure of a form: grams, pence, a rate or a count. */
export function FormNumber<Values extends FieldValues>({ control, name, ...field }: FormNumberProps<Values>) {
  const { field: bound, fieldState, formState } = useController({ control, name });
  return (
    <NumberField
      {...field}
      value={bound.value ?? null}
      onChange={bound.onChange}
      onBlur={bound.onBlur}
      error={shownError({ fieldState, formState })}
    />
  );
}
