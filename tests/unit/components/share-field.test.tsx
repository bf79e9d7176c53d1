// @vitest-environment happy-dom
import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { useState } from 'react';
import { afterEach, describe, expect, it } from 'vitest';
import { ShareField } from '#components/specifications/share-field.tsx';

afterEach(cleanup);

/** The field with what it counts for beside it, as the editor holds it. */
function Draft({ start }: { start: number }) {
  const [ppht, setPpht] = useState(start);
  return (
    <>
      <ShareField label="Brisket, meat" ppht={ppht} onChange={setPpht} isReadOnly={false} />
      <output>{ppht}</output>
      <button onClick={() => setPpht(start)}>Undo</button>
    </>
  );
}

function type(text: string): void {
  fireEvent.change(screen.getByLabelText('Brisket, meat'), { target: { value: text } });
}
const shown = () => screen.getByLabelText<HTMLInputElement>('Brisket, meat').value;
const counts = () => screen.getByRole('status').textContent;

describe('a share while it is typed', () => {
  it('as a percentage, counts in parts per 100,000', () => {
    render(<Draft start={5_389} />);
    expect(shown()).toBe('5.389');
    type('5.');
    expect([shown(), counts()]).toEqual(['5.', '5000']);
    type('5.25');
    expect([shown(), counts()]).toEqual(['5.25', '5250']);
  });

  it.each([
    ['nothing', ''],
    ['a word', 'half'],
    ['less than nothing', '-0.5'],
    ['more than all', '100.001'],
  ])('as %s, counts for nothing and stays as it was typed', (_name, text) => {
    render(<Draft start={5_389} />);
    type(text);
    expect([shown(), counts()]).toEqual([text, '0']);
    expect(screen.queryByRole('alert') !== null).toBe(text !== '');
  });

  it('when all is undone, shows what it was', () => {
    render(<Draft start={5_389} />);
    type('half');
    fireEvent.click(screen.getByText('Undo'));
    expect([shown(), counts()]).toEqual(['5.389', '5389']);
  });
});
