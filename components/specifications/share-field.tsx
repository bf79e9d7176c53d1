import { useState } from 'react';
import { NumberField } from '#components/ui/number-field.tsx';

type ShareFieldProps = {
  /** Says which share of what; out of sight where a column says it. */
  label: string;
  ppht: number;
  onChange: (ppht: number) => void;
  isReadOnly: boolean;
  /** In a table: the label is for those who listen. */
  isCell?: boolean;
};

/** A share in per cent, kept in parts per 100,000. An emptied field counts as nothing until something is typed. */
export function ShareField({ label, ppht, onChange, isReadOnly, isCell = true }: ShareFieldProps) {
  const [typed, setTyped] = useState<number | null>(ppht);
  const isNumber = typed !== null && Number.isFinite(typed) && typed >= 0 && typed <= 100_000;
  // What stands in the field counts for `ppht`; a share that changed elsewhere is shown in its place.
  const shown = (isNumber ? typed : 0) === ppht ? typed : ppht;
  return (
    <NumberField
      label={label}
      isLabelHidden={isCell}
      width={isCell ? 'cell' : 'short'}
      unit="percent"
      value={shown}
      readOnly={isReadOnly}
      error={shown === null || Object.is(shown, ppht) ? undefined : 'Give a share from 0 to 100, such as 4.25.'}
      onChange={(next) => {
        setTyped(next);
        onChange(next !== null && Number.isFinite(next) && next >= 0 && next <= 100_000 ? next : 0);
      }}
    />
  );
}
