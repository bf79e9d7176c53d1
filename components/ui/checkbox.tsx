import { useId } from 'react';
import { FieldError } from './field-frame.tsx';

type CheckboxProps = {
  label: string;
  note?: string | undefined;
  checked: boolean;
  onChange: (checked: boolean) => void;
  error?: string | undefined;
  disabled?: boolean;
};

export function Checkbox({ label, note, checked, onChange, error, disabled = false }: CheckboxProps) {
  const id = useId();
  return (
    <div className="w-field">
      <label className="w-choice">
        <input
          type="checkbox"
          checked={checked}
          disabled={disabled}
          onChange={(event) => onChange(event.target.checked)}
          aria-invalid={Boolean(error)}
          aria-describedby={error ? `${id}-error` : undefined}
        />
        <span className="w-choice-words">
          {label}
          {note ? <span className="w-choice-note">{note}</span> : null}
        </span>
      </label>
      <FieldError id={`${id}-error`} error={error} />
    </div>
  );
}
