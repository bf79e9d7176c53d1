import type { ComponentProps } from 'react';
import { useController, type Control, type FieldPath, type FieldValues } from 'react-hook-form';
import { DateField } from './date-field.tsx';
import { shownError } from './shown-error.ts';

type FormDayProps<Values extends FieldValues> = Omit<
  ComponentProps<typeof DateField>,
  'value' | 'onChange' | 'onBlur' | 'error'
> & { control: Control<Values>; name: FieldPath<Values> };

/** A day of a form. */
export function FormDay<Values extends FieldValues>({ control, name, ...date }: FormDayProps<Values>) {
  const { field: bound, fieldState, formState } = useController({ control, name });
  return (
    <DateField
      {...date}
      value={bound.value ?? ''}
      onChange={bound.onChange}
      onBlur={bound.onBlur}
      error={shownError({ fieldState, formState })}
    />
  );
}
