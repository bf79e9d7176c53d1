// @vitest-environment happy-dom
import { cleanup, fireEvent, render, screen, within } from '@testing-library/react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { mergePrimals, type RailPrimal } from '#components/rail/rail-geometry.ts';
import { Rail } from '#components/rail/rail.tsx';

afterEach(cleanup);

const primals: RailPrimal[] = [
  { id: 'fore-shin', name: 'Fore shin', shortName: 'Shin', grams: 6_000, soldGrams: 1_000, heldGrams: 0 },
  { id: 'fore-rib', name: 'Fore rib', shortName: 'Rib', grams: 12_400, soldGrams: 8_200, heldGrams: 1_200 },
  { id: 'hind-shin', name: 'Hind shin', shortName: 'Shin', grams: 4_000, soldGrams: 4_000, heldGrams: 0 },
];

function cellsOf(row: HTMLElement): string[] {
  return within(row)
    .getAllByRole('cell')
    .map((cell) => cell.textContent);
}

describe('the rail', () => {
  it('reads aloud as a table with a caption, a row for each primal and a total', () => {
    render(<Rail primals={primals} caption="Steer 00214, left" />);
    const table = screen.getByRole('table', { name: 'Steer 00214, left' });
    const rows = within(table).getAllByRole('row');
    expect(rows).toHaveLength(5);
    expect(within(table).getByRole('rowheader', { name: 'Fore rib' })).toBeTruthy();
    expect(rows[2] && cellsOf(rows[2])).toEqual(['12.4 kg', '8.2 kg', '1.2 kg', '3.0 kg']);
    expect(rows[4] && cellsOf(rows[4])).toEqual(['22.4 kg', '13.2 kg', '1.2 kg', '8.0 kg']);
  });

  it('gives each primal a button whose name tells weight and fill, without parts of no weight', () => {
    render(<Rail primals={primals} caption="Steer 00214, left" />);
    const group = screen.getByRole('group', { name: 'Steer 00214, left' });
    expect(
      within(group)
        .getAllByRole('button')
        .map((button) => button.getAttribute('aria-label')),
    ).toEqual([
      'Fore shin, 6.0 kg: 1.0 kg sold, 5.0 kg free',
      'Fore rib, 12.4 kg: 8.2 kg sold, 1.2 kg held, 3.0 kg free',
      'Hind shin, 4.0 kg: 4.0 kg sold',
    ]);
  });

  it('when a primal is tapped, names it, marks it as pressed and tells the screen', () => {
    const onSelect = vi.fn();
    render(<Rail primals={primals} caption="A side" onSelect={onSelect} />);
    fireEvent.click(screen.getByRole('button', { name: /^Fore rib/ }));
    expect(onSelect).toHaveBeenCalledExactlyOnceWith('fore-rib');
    expect(screen.getByRole('status').textContent).toBe('Fore rib 12.4 kg: 8.2 kg sold, 1.2 kg held, 3.0 kg free');
    expect(screen.getByRole('button', { name: /^Fore rib/ }).getAttribute('aria-pressed')).toBe('true');
    expect(screen.getByRole('button', { name: /^Fore shin/ }).getAttribute('aria-pressed')).toBe('false');
  });

  it('stops the Tab key once and is walked with the arrow keys', () => {
    const onSelect = vi.fn();
    render(<Rail primals={primals} caption="A side" selectedId="fore-rib" onSelect={onSelect} naming={false} />);
    const buttons = screen.getAllByRole('button');
    expect(buttons.map((button) => button.getAttribute('tabindex'))).toEqual(['-1', '0', '-1']);
    const rib = screen.getByRole('button', { name: /^Fore rib/ });
    fireEvent.keyDown(rib, { key: 'ArrowRight' });
    expect(onSelect).toHaveBeenLastCalledWith('hind-shin');
    expect(document.activeElement?.getAttribute('aria-label')).toMatch(/^Hind shin/);
  });

  it('reaches the next primal from the line that names the chosen one, and no further than the last', () => {
    render(<Rail primals={primals} caption="A side" />);
    fireEvent.click(screen.getByRole('button', { name: /^Fore rib/ }));
    fireEvent.click(screen.getByRole('button', { name: 'Next primal' }));
    expect(screen.getByRole('status').textContent).toContain('Hind shin');
    expect(screen.getByRole('button', { name: 'Next primal' }).hasAttribute('disabled')).toBe(true);
  });

  it('with merged primals, carries both lines for the stylesheet to choose from and one table', () => {
    const shin = { id: 'shin', name: 'Shins', shortName: 'Shin', memberIds: ['fore-shin', 'hind-shin'] };
    render(<Rail primals={primals} narrowPrimals={mergePrimals(primals, [shin])} caption="A side" />);
    expect(screen.getAllByRole('button')).toHaveLength(5);
    expect(screen.getAllByRole('table')).toHaveLength(1);
    fireEvent.click(screen.getByRole('button', { name: /^Shins/ }));
    expect(screen.getByRole('status').textContent).toBe('Shins 10.0 kg: 5.0 kg sold, 5.0 kg free');
  });

  it("on a box's rail, says taken and left", () => {
    render(<Rail primals={primals} mode="takes" caption="Twenty Hearth boxes, one side" captionShown />);
    expect(screen.getByRole('button', { name: /^Fore shin/ }).getAttribute('aria-label')).toBe(
      'Fore shin, 6.0 kg: 1.0 kg taken, 5.0 kg left',
    );
    expect(screen.getByRole('columnheader', { name: 'taken' })).toBeTruthy();
  });

  it('with nothing on it, says so', () => {
    render(<Rail primals={[]} caption="A side" />);
    expect(screen.getByText('Nothing hangs here yet.')).toBeTruthy();
  });
});
