import { useId } from 'react';
import { describedBy, FieldFrame, type FieldWords } from './field-frame.tsx';
import { Icon } from './icon.tsx';

type Option = { value: string; label: string; disabled?: boolean };

type SelectProps = FieldWords & {
  value: string;
  options: readonly Option[];
  onChange: (value: string) => void;
  onBlur?: (() => void) | undefined;
  /** Stands first while nothing is chosen. */
  placeholder?: string;
  autoComplete?: string;
  width?: 'full' | 'short';
};

/** The browser's own list: on a phone it is the phone's wheel, and the keyboard works as people know it. */
export function Select(props: SelectProps) {
  const { label, hint, error, optional, value, width = 'full' } = props;
  const id = useId();
  const words = { label, hint, error, optional };
  return (
    <FieldFrame id={id} words={words}>
      <div className={`w-control w-control-${width}${error ? ' w-control-wrong' : ''}`}>
        <select
          id={id}
          className="w-input"
          value={value}
          autoComplete={props.autoComplete}
          onChange={(event) => props.onChange(event.target.value)}
          onBlur={() => props.onBlur?.()}
          aria-describedby={describedBy(id, words)}
          aria-invalid={Boolean(error)}
          required={!optional}
        >
          {props.placeholder ? (
            <option value="" disabled={!optional}>
              {props.placeholder}
            </option>
          ) : null}
          {props.options.map((option) => (
            <option key={option.value} value={option.value} disabled={option.disabled}>
              {option.label}
            </option>
          ))}
        </select>
        <span className="w-control-arrow">
          <Icon name="down" size={16} />
        </span>
      </div>
    </FieldFrame>
  );
}
