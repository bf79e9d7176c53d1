import { useState, type ComponentProps } from 'react';
import { parseDecimal, UNITS, writeDecimal, type Unit } from './decimal.ts';
import { Field } from './field.tsx';

type NumberFieldProps = Omit<ComponentProps<typeof Field>, 'value' | 'onChangeText' | 'inputMode'> & {
  unit: Unit;
  /** Whole numbers of the smallest unit; null when empty, NaN while what stands there is no number. */
  value: number | null;
  onChange: (value: number | null) => void;
};

/** A figure as people write it, kept as a whole number of grams, pence or pieces. */
export function NumberField({ unit, value, onChange, error, ...field }: NumberFieldProps) {
  const [typed, setTyped] = useState({ text: writeDecimal(value, unit), value });
  const { before, after, decimals } = UNITS[unit];
  // A value that came from elsewhere replaces what was typed; the same value leaves `12.` on its way to `12.5` alone.
  const text = Object.is(typed.value, value) ? typed.text : writeDecimal(value, unit);
  const type = (next: string) => {
    const parsed = parseDecimal(next, unit);
    setTyped({ text: next, value: parsed });
    onChange(parsed);
  };
  return (
    <Field
      width="short"
      {...(before ? { before } : {})}
      {...(after ? { after } : {})}
      {...field}
      inputMode={decimals > 0 ? 'decimal' : 'numeric'}
      value={text}
      onChangeText={type}
      error={error && sayOf(value, { unit, error })}
    />
  );
}

/** The contract speaks of grams and pence; whoever typed kilograms or pounds is told about those. */
function sayOf(value: number | null, { unit, error }: { unit: Unit; error: string }): string {
  if (value === null) return 'This is needed.';
  if (value < 0) return 'This cannot be below zero.';
  if (!Number.isNaN(value)) return error;
  if (unit === 'count') return 'Give a whole number, such as 4.';
  if (unit === 'percent') return 'Give a percentage, such as 1.5.';
  return unit === 'kilograms' ? 'Give kilograms, such as 4.25.' : 'Give pounds, such as 18.50.';
}
