import { useId } from 'react';
import { describedBy, FieldError, type FieldWords } from './field-frame.tsx';

export type Choice = {
  value: string;
  label: string;
  note?: string | undefined;
  /** A figure at the end of the line: a price, what a choice would cost. */
  end?: string | undefined;
  disabled?: boolean;
};

type RadioGroupProps = FieldWords & {
  value: string | undefined;
  choices: readonly Choice[];
  onChange: (value: string) => void;
  /** Hairlines between the choices, for longer ones. */
  ruled?: boolean;
};

export function RadioGroup({ value, choices, onChange, ruled = false, ...words }: RadioGroupProps) {
  const id = useId();
  return (
    <fieldset className="w-field" aria-describedby={describedBy(id, words)}>
      <legend className="w-label">{words.label}</legend>
      {words.hint ? (
        <div className="w-hint" id={`${id}-hint`}>
          {words.hint}
        </div>
      ) : null}
      <div className={ruled ? 'w-choices w-choices-ruled' : 'w-choices'}>
        {choices.map((choice) => (
          <label className="w-choice" key={choice.value}>
            <input
              type="radio"
              name={id}
              value={choice.value}
              checked={choice.value === value}
              disabled={choice.disabled}
              onChange={() => onChange(choice.value)}
            />
            <span className="w-choice-words">
              {choice.label}
              {choice.note ? <span className="w-choice-note">{choice.note}</span> : null}
            </span>
            {choice.end ? <span className="w-choice-end">{choice.end}</span> : null}
          </label>
        ))}
      </div>
      <FieldError id={`${id}-error`} error={words.error} />
    </fieldset>
  );
}
