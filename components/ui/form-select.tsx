import type { ComponentProps } from 'react';
import { useController, type Control, type FieldPath, type FieldValues } from 'react-hook-form';
import { Select } from './select.tsx';
import { shownError } from './shown-error.ts';

type FormSelectProps<Values extends FieldValues> = Omit<
  ComponentProps<typeof Select>,
  'value' | 'onChange' | 'onBlur' | 'error'
> & { control: Control<Values>; name: FieldPath<Values> };

/** A choice of a form. Where it may be left open, no choice is sent as null. */
export function FormSelect<Values extends FieldValues>({ control, name, ...select }: FormSelectProps<Values>) {
  const { field: bound, fieldState, formState } = useController({ control, name });
  return (
    <Select
      {...select}
      value={bound.value ?? ''}
      onChange={(value) => bound.onChange(value === '' && select.optional ? null : value)}
      onBlur={bound.onBlur}
      error={shownError({ fieldState, formState })}
    />
  );
}
