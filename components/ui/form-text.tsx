import type { ComponentProps } from 'react';
import { useController, type Control, type FieldPath, type FieldValues } from 'react-hook-form';
import { Field } from './field.tsx';
import { shownError } from './shown-error.ts';

type FormTextProps<Values extends FieldValues> = Omit<
  ComponentProps<typeof Field>,
  'value' | 'onChangeText' | 'onBlur' | 'error' | 'ref'
> & {
  control: Control<Values>;
  name: FieldPath<Values>;
  /** An empty field is sent as null: nothing is known, rather than nothing is written. */
  emptyIsNull?: boolean;
};

/** A field of a form: holds its text and shows the form's error beside it. */
export function FormText<Values extends FieldValues>(props: FormTextProps<Values>) {
  const { control, name, emptyIsNull = false, ...field } = props;
  const { field: bound, fieldState, formState } = useController({ control, name });
  return (
    <Field
      {...field}
      value={bound.value ?? ''}
      onChangeText={(text) => bound.onChange(emptyIsNull && text.trim() === '' ? null : text)}
      onBlur={bound.onBlur}
      error={shownError({ fieldState, formState })}
    />
  );
}
