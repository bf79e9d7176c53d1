// @vitest-environment happy-dom
import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { useState } from 'react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { NumberField } from '#components/ui/number-field.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { AppError } from '#shared/errors.ts';

afterEach(cleanup);

function Weight({ error, onValue }: { error?: string; onValue?: (value: number | null) => void }) {
  const [value, setValue] = useState<number | null>(12_400);
  return (
    <NumberField
      unit="kilograms"
      label="Weight"
      value={value}
      error={error}
      onChange={(next) => {
        setValue(next);
        onValue?.(next);
      }}
    />
  );
}

const box = () => screen.getByLabelText<HTMLInputElement>('Weight');
const type = (value: string) => fireEvent.change(box(), { target: { value } });

describe('a field for a figure', () => {
  it('shows grams as kilograms, and gives grams, nothing or no number as it is typed', () => {
    const onValue = vi.fn();
    render(<Weight onValue={onValue} />);
    expect(box().value).toBe('12.4');
    type('12.');
    expect(box().value).toBe('12.');
    expect(onValue).toHaveBeenLastCalledWith(12_000);
    type('');
    expect(onValue).toHaveBeenLastCalledWith(null);
    type('twelve');
    expect(onValue).toHaveBeenLastCalledWith(Number.NaN);
    expect(box().value).toBe('twelve');
  });

  it('says what is wrong in the unit that was typed', () => {
    render(<Weight error="Give whole grams." />);
    expect(screen.getByRole('alert').textContent).toBe('Give whole grams.');
    type('');
    expect(screen.getByRole('alert').textContent).toBe('This is needed.');
    type('x');
    expect(screen.getByRole('alert').textContent).toBe('Give kilograms, such as 4.25.');
    type('-3');
    expect(screen.getByRole('alert').textContent).toBe('This cannot be below zero.');
  });
});

describe('why a change was refused', () => {
  it('when somebody else changed the record, says that nothing was overwritten and offers the newest', () => {
    const onShowNewest = vi.fn();
    const error = new AppError('STATE_CHANGED', 'Rowan saved this record a minute ago.');
    render(<ProblemNotice error={error} title="The record was not saved." onShowNewest={onShowNewest} />);
    expect(screen.getByRole('status').textContent).toContain('Rowan saved this record a minute ago.');
    expect(screen.getByText(/Nothing was overwritten/)).toBeTruthy();
    fireEvent.click(screen.getByRole('button', { name: 'Show what it is now' }));
    expect(onShowNewest).toHaveBeenCalledOnce();
  });

  it('when fields were refused, points to them; without an error, draws nothing', () => {
    const error = new AppError('INVALID_INPUT', 'Nothing was saved.', { fields: { earTag: 'Known already.' } });
    const { rerender, container } = render(<ProblemNotice error={error} title="The animal was not added." />);
    expect(screen.getByRole('alert').textContent).toContain('stands beside the fields');
    rerender(<ProblemNotice error={null} title="The animal was not added." />);
    expect(container.textContent).toBe('');
  });
});
