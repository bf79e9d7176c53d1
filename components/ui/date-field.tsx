import { useId } from 'react';
import type { Day } from '#shared/domain/day.ts';
import { formatDayWithYear } from '#shared/domain/words.ts';
import { describedBy, FieldFrame, type FieldWords } from './field-frame.tsx';

type DateFieldProps = FieldWords & {
  /** `YYYY-MM-DD`, or empty. */
  value: Day;
  onChange: (day: Day) => void;
  onBlur?: (() => void) | undefined;
  min?: Day | undefined;
  max?: Day | undefined;
};

/** The browser's own date input, with the day of the week said beside it: farms think in weekdays. */
export function DateField(props: DateFieldProps) {
  const { label, hint, error, optional, value } = props;
  const id = useId();
  const words = { label, hint, error, optional };
  return (
    <FieldFrame id={id} words={words}>
      <div className="w-date">
        <div className={`w-control w-control-short${error ? ' w-control-wrong' : ''}`}>
          <input
            id={id}
            className="w-input"
            type="date"
            value={value}
            min={props.min}
            max={props.max}
            onChange={(event) => props.onChange(event.target.value)}
            onBlur={() => props.onBlur?.()}
            aria-describedby={describedBy(id, words)}
            aria-invalid={Boolean(error)}
            required={!optional}
          />
        </div>
        {value ? <span className="w-date-words">{formatDayWithYear(value)}</span> : null}
      </div>
    </FieldFrame>
  );
}
