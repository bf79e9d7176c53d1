import { useId } from 'react';
import { describedBy, FieldError, type FieldWords } from './field-frame.tsx';

export type Chip = {
  value: string;
  label: string;
  /** A second, smaller word: how many are left. */
  note?: string | undefined;
  disabled?: boolean;
};

type ChipGroupProps = FieldWords & {
  value: string | undefined;
  chips: readonly Chip[];
  onChange: (value: string) => void;
  /** Equal columns, for many chips of one kind such as times. */
  grid?: boolean;
  /** The label is for screen readers only, where a heading stands above. */
  labelHidden?: boolean;
};

/** One of a few short choices, side by side: real radio buttons, so the arrow keys walk along them. */
export function ChipGroup({ value, chips, onChange, grid = false, labelHidden = false, ...words }: ChipGroupProps) {
  const id = useId();
  return (
    <fieldset className="w-field" aria-describedby={describedBy(id, words)}>
      <legend className={labelHidden ? 'w-hidden' : 'w-label w-label-chips'}>{words.label}</legend>
      {words.hint ? (
        <div className="w-hint" id={`${id}-hint`}>
          {words.hint}
        </div>
      ) : null}
      <div className={grid ? 'w-slots' : 'w-chips'}>
        {chips.map((chip) => (
          <label className="w-chip" key={chip.value}>
            <input
              type="radio"
              name={id}
              value={chip.value}
              checked={chip.value === value}
              disabled={chip.disabled}
              onChange={() => onChange(chip.value)}
            />
            <span>{chip.label}</span>
            {chip.note ? <span className="w-chip-note">{chip.note}</span> : null}
          </label>
        ))}
      </div>
      <FieldError id={`${id}-error`} error={words.error} />
    </fieldset>
  );
}
