// @vitest-environment happy-dom
import { cleanup, fireEvent, render, screen, within } from '@testing-library/react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { SlotPicker } from '#components/checkout/slot-picker.tsx';
import { makePoints } from '#tests/support/make-shop.ts';

afterEach(cleanup);

function draw(over: Partial<Parameters<typeof SlotPicker>[0]> = {}) {
  const onPoint = vi.fn();
  const onSlot = vi.fn();
  render(
    <SlotPicker
      points={makePoints()}
      pointId={undefined}
      onPoint={onPoint}
      slotId=""
      onSlot={onSlot}
      error={undefined}
      {...over}
    />,
  );
  return { onPoint, onSlot };
}

describe('the slot picker', () => {
  it('before a place is chosen, names the places with their addresses and shows no times', () => {
    const { onPoint } = draw();
    const places = within(screen.getByRole('group', { name: 'Where will you collect it?' })).getAllByRole('radio');
    expect(places).toHaveLength(2);
    expect(screen.queryByRole('group', { name: /When/ })).toBeNull();
    fireEvent.click(screen.getByRole('radio', { name: /The farm gate.*Under Rigg/ }));
    expect(onPoint).toHaveBeenCalledWith('gate');
  });

  it('a place whose every time is taken, cannot be chosen and says so', () => {
    draw();
    const chapel = screen.getByRole('radio', { name: /The old chapel.*full/ });
    expect(chapel).toHaveProperty('disabled', true);
  });

  it('with a place chosen, groups its times by day in the time of the farm', () => {
    const { onSlot } = draw({ pointId: 'gate' });
    const friday = screen.getByRole('group', { name: 'When, on Fri 11 Dec?' });
    expect(within(friday).getAllByRole('radio')).toHaveLength(2);
    expect(screen.getByRole('group', { name: 'When, on Sat 12 Dec?' })).toBeTruthy();
    fireEvent.click(within(friday).getByRole('radio', { name: /14:00–14:30/ }));
    expect(onSlot).toHaveBeenCalledWith('friday-2');
  });

  it('a time that is full, is named full and disabled; a scarce one tells how many places are left', () => {
    draw({ pointId: 'gate' });
    expect(screen.getByRole('radio', { name: /14:30–15:00.*full/ })).toHaveProperty('disabled', true);
    expect(screen.getByRole('radio', { name: /09:00–09:30.*1 place left/ })).toHaveProperty('disabled', false);
  });

  it('an error, is spoken', () => {
    draw({ pointId: 'gate', error: 'Choose a place and a time.' });
    expect(screen.getByRole('alert').textContent).toBe('Choose a place and a time.');
  });
});
