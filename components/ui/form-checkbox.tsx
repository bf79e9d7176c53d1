import { useController, type Control, type FieldPath, type FieldValues } from 'react-hook-form';
import { Checkbox } from './checkbox.tsx';

type FormCheckboxProps<Values extends FieldValues> = {
  control: Control<Values>;
  name: FieldPath<Values>;
  label: string;
  note?: string | undefined;
};

/** A yes or no of a form. */
export function FormCheckbox<Values extends FieldValues>({ control, name, label, note }: FormCheckboxProps<Values>) {
  const { field: bound, fieldState } = useController({ control, name });
  return (
    <Checkbox
      label={label}
      note={note}
      checked={bound.value === true}
      onChange={bound.onChange}
      error={fieldState.error?.message}
    />
  );
}
