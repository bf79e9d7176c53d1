// @vitest-environment happy-dom
import { cleanup, fireEvent, render, screen, within } from '@testing-library/react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { compareRows } from '#components/allocation/compare-table.tsx';
import { CutTable } from '#components/allocation/cut-table.tsx';
import { areSameLocks, choicesOf, narrowMembers, setLock } from '#components/allocation/locks.ts';
import { OfferList } from '#components/allocation/offer-list.tsx';
import {
  boxesOnSale,
  describePlan,
  nameSide,
  nameTradeLine,
  perColdKg,
  signedMoney,
} from '#components/allocation/plan-words.ts';
import { listRows } from '#components/allocation/printed-list.tsx';
import { WayPanel } from '#components/allocation/way-panel.tsx';
import { CARCASE, makeAllocation, makeSide } from '#tests/support/make-workbench.ts';

afterEach(cleanup);

const place = { carcaseId: CARCASE, side: 'left' as const, choiceId: 'fore-rib' };

describe('locks', () => {
  it('sets, changes and takes off one lock without touching the others', () => {
    const other = { carcaseId: CARCASE, side: 'right' as const, choiceId: 'fore-rib', wayId: 'rib-eye' };
    const set = setLock([other], place, 'bone-in');
    expect(set).toEqual([other, { ...place, wayId: 'bone-in' }]);
    expect(setLock(set, place, 'rib-eye')).toEqual([other, { ...place, wayId: 'rib-eye' }]);
    expect(setLock(set, place, undefined)).toEqual([other]);
  });

  it('says the same in any order, and not when one way differs', () => {
    const a = { ...place, wayId: 'bone-in' };
    const b = { ...place, side: 'right' as const, wayId: 'rib-eye' };
    expect(areSameLocks([a, b], [b, a])).toBe(true);
    expect(areSameLocks([a, b], [a, { ...b, wayId: 'bone-in' }])).toBe(false);
    expect(areSameLocks([a], [a, b])).toBe(false);
  });

  it('finds the choices of a primal, and of all members of a merged one', () => {
    const members = narrowMembers({ narrowPrimals: [{ id: 'rib-and-brisket', primalIds: ['fore-rib', 'brisket'] }] });
    const names = (ids: readonly string[]) => choicesOf(makeSide(), ids).map((choice) => choice.name);
    expect(names(['brisket'])).toEqual(['Brisket']);
    expect(names(members['rib-and-brisket'] ?? [])).toEqual(['Fore rib', 'Brisket']);
    expect(narrowMembers(undefined)).toEqual({});
  });
});

describe('the panel of ways', () => {
  it('shows what the lock costs, what is planned and why a way is closed', () => {
    render(
      <WayPanel
        side={makeSide()}
        primalIds={['fore-rib']}
        locks={makeAllocation().locks}
        isExplained
        onLock={vi.fn()}
      />,
    );
    expect(screen.getByRole('heading', { name: 'Fore rib, Angus steer 00214, left · locked' })).toBeTruthy();
    expect(screen.getByText('This lock costs £18.60.')).toBeTruthy();
    expect(screen.getByRole<HTMLInputElement>('radio', { name: /^On the bone/ }).checked).toBe(true);
    const closed = screen.getByRole<HTMLInputElement>('radio', { name: /^Cutlets.*vertebral column/ });
    expect(closed.disabled).toBe(true);
  });

  it('when another way is chosen, asks for that lock; when the plan shall choose, for none', () => {
    const onLock = vi.fn();
    render(
      <WayPanel
        side={makeSide()}
        primalIds={['fore-rib']}
        locks={makeAllocation().locks}
        isExplained
        onLock={onLock}
      />,
    );
    fireEvent.click(screen.getByRole('radio', { name: /^Rib-eye steaks/ }));
    expect(onLock).toHaveBeenLastCalledWith('fore-rib', 'rib-eye');
    fireEvent.click(screen.getByRole('radio', { name: /^As the plan finds best/ }));
    expect(onLock).toHaveBeenLastCalledWith('fore-rib', undefined);
  });

  it('while the cost of a lock is being worked out, says so', () => {
    const side = makeSide();
    const [rib] = side.choices;
    const waiting = makeSide({ choices: rib ? [{ ...rib, lockCostPence: null }] : [] });
    const locks = makeAllocation().locks;
    render(<WayPanel side={waiting} primalIds={['fore-rib']} locks={locks} isExplained={false} onLock={vi.fn()} />);
    expect(screen.getByText('What this lock costs is being worked out …')).toBeTruthy();
  });

  it('when a lock is not worked out yet, says no cost', () => {
    const locks = [{ ...place, wayId: 'rib-eye' }];
    render(<WayPanel side={makeSide()} primalIds={['fore-rib']} locks={locks} isExplained onLock={vi.fn()} />);
    expect(screen.queryByText(/This lock costs/)).toBeNull();
  });

  it('names the buyer of what leaves whole', () => {
    render(<WayPanel side={makeSide()} primalIds={['brisket']} locks={[]} isExplained onLock={vi.fn()} />);
    expect(screen.getByText('Now: sold whole to Pellow & Dray')).toBeTruthy();
  });
});

describe('the plan in words and figures', () => {
  it('says day, carcases and kilograms in one line, and names a side', () => {
    expect(describePlan(makeAllocation())).toBe('Cutting day Thu 10 Dec · 1 carcase · 640 kg cold · 448 kg of product');
    expect(nameSide(makeSide())).toBe('Angus steer 00214, left');
  });

  it('counts what goes on sale, and names a trade line without its business', () => {
    expect(boxesOnSale(makeAllocation())).toBe(35 + 14);
    const line = { reservationNo: 504, businessName: 'Pellow & Dray', grams: 80_000 };
    expect(nameTradeLine({ ...line, name: 'hind, Pellow & Dray' })).toBe('Hindquarter');
    expect(nameTradeLine({ ...line, name: 'Brisket, boned and rolled' })).toBe('Brisket, boned and rolled');
  });

  it('reckons the gain on deadweight per kg of cold weight', () => {
    expect(perColdKg(91_100, makeAllocation())).toBe('£1.42/kg');
    expect(perColdKg(91_100, makeAllocation({ coldGrams: 0 }))).toBe('£0.00/kg');
    expect(signedMoney(4_120)).toBe('+ £41.20');
    expect(signedMoney(-1_860)).toBe('− £18.60');
    expect(signedMoney(0)).toBe('no difference');
  });

  it('lists each box with its number, what is spoken for and what limits it', () => {
    render(<OfferList boxes={makeAllocation().boxes} isExplained />);
    const [hearth, table] = screen.getAllByRole('listitem');
    expect(hearth?.textContent).toBe(
      'Hearth38Limited by its cuts. One more lacks Steaks: 300 g35 may be put on sale while weights are estimates4 sold, 1 held',
    );
    expect(table?.textContent).toContain('Limited by what people are likely to buy');
  });

  it('reads the kilograms in, out and over as a table with its sum', () => {
    render(<CutTable cuts={makeAllocation().cuts} />);
    const table = screen.getByRole('table', { name: 'Kilograms of each cut: in, out and over' });
    const cells = within(table)
      .getAllByRole('row')
      .map((row) => row.textContent);
    expect(cells[1]).toBe('Mince60.0 kg40.0 kg10.0 kg––10.0 kg£4.20/kg');
    expect(cells[2]).toContain('All cuts60.0 kg');
  });

  it('compares two answers: boxes that only one has count as none in the other', () => {
    const before = makeAllocation({
      boxes: [{ ...makeAllocation().boxes[0], boxKindId: 'c', name: 'Ember' } as never],
    });
    const rows = new Map(compareRows(before, makeAllocation()).map((row) => [row.name, row]));
    expect(rows.get('Contribution')?.difference).toBe('no difference');
    expect(rows.get('Ember')).toMatchObject({ before: '38', now: '0', difference: '− 38' });
    expect(rows.get('Table')).toMatchObject({ before: '0', now: '14', difference: '+ 14' });
    expect(rows.has('Mince, loose')).toBe(false);
    expect(compareRows(null, makeAllocation(), true).find((row) => row.name === 'Hearth')?.now).toBe('35');
    expect(compareRows(null, makeAllocation())[0]).toMatchObject({ before: '–', difference: '–' });
  });
});

describe('the printed cutting list', () => {
  it('has a row for each cut with its way, and one for a primal that leaves whole', () => {
    expect(listRows(makeSide())).toEqual([
      { id: 'fore-rib rib-on-the-bone', primal: 'Fore rib', way: 'On the bone', cut: 'Rib on the bone', grams: 8_400 },
      { id: 'brisket', primal: 'Brisket', way: 'sold whole to Pellow & Dray', cut: 'leaves whole', grams: 0 },
    ]);
  });
});
