import { useController, type Control, type FieldPath, type FieldValues } from 'react-hook-form';
import { Checkbox } from './checkbox.tsx';
import { shownError } from './shown-error.ts';

type FormCheckboxProps<Values extends FieldValues> = {
  control: Control<Values>;
  name: FieldPath<Values>;
  label: string;
  note?: string | undefined;
};

/** A yes or no of a form. */
export function FormCheckbox<Values extends FieldValues>({ control, name, label, note }: FormCheckboxProps<Values>) {
  const { field: bound, fieldState, formState } = useController({ control, name });
  return (
    <Checkbox
      label={label}
      note={note}
      checked={bound.value === true}
      onChange={bound.onChange}
      error={shownError({ fieldState, formState })}
    />
  );
}
