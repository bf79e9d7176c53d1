// @vitest-environment happy-dom
import { zodResolver } from '@hookform/resolvers/zod';
import { cleanup, fireEvent, render, screen, waitFor } from '@testing-library/react';
import { useForm } from 'react-hook-form';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { ReserveForm } from '#components/trade/reserve-form.tsx';
import { estimatePence, setCutGrams, toggleUnit } from '#components/trade/trade-words.ts';
import { NewReservation, type TradeDay } from '#shared/contracts/trade-schema.ts';

afterEach(cleanup);

const CARCASE = '7d7f8c1e-1111-4111-8111-111111111111';
const DAY = '1c1f8c1e-3333-4333-8333-333333333333';
const hind = {
  unitKind: 'hind',
  name: 'Hindquarter',
  grams: 78_000,
  isTaken: false,
  closedReason: null,
  tenthPencePerKg: 7_200,
};

const day: TradeDay = {
  id: DAY,
  day: '2026-12-10',
  cutOffAt: '2026-12-08T18:00:00.000Z',
  isInTime: true,
  carcases: [
    {
      id: CARCASE,
      animalId: CARCASE,
      earTag: 'UK123450600214',
      sex: 'steer',
      breed: 'Angus',
      state: 'hanging',
      killDay: '2026-11-20',
      cuttingDayId: DAY,
      day: '2026-12-10',
      ageMonths: 24,
      isOverThirtyMonths: false,
      hungDays: 20,
      conformation: 'R',
      fatClass: '4L',
      coldGrams: 320_000,
      coldSource: 'weighed',
      version: 1,
      sides: [
        {
          side: 'left',
          sideGrams: 160_000,
          rail: { primals: [], narrowPrimals: [] },
          units: [
            hind,
            { ...hind, unitKind: 'fore', name: 'Forequarter', isTaken: true },
            { ...hind, unitKind: 'side', name: 'Side', tenthPencePerKg: null },
          ],
        },
      ],
    },
  ],
  cuts: [{ cutId: 'brisket', name: 'Brisket', tenthPencePerKg: 9_500, madeGrams: 32_000 }],
};

function Screen({ send }: { send: (values: NewReservation) => void }) {
  const form = useForm<NewReservation>({
    resolver: zodResolver(NewReservation),
    defaultValues: { requestKey: CARCASE, dayId: DAY, lines: [], cuttingNote: '' },
  });
  const submit = form.handleSubmit(send);
  return <ReserveForm control={form.control} day={day} onSubmit={() => void submit()} busy={false} />;
}

describe('reserving', () => {
  it("reckons a hindquarter and kilograms of a cut at the butcher's own prices", () => {
    const unit = { kind: 'unit' as const, unitKind: 'hind', carcaseId: CARCASE, side: 'left' as const };
    const lines = setCutGrams(toggleUnit([], unit), 'brisket', 10_000);
    expect(estimatePence(lines, day)).toBe(56_160 + 9_500);
    expect(toggleUnit(lines, unit)).toEqual([{ kind: 'cut', cutId: 'brisket', grams: 10_000 }]);
    expect(setCutGrams(lines, 'brisket', null)).toEqual([unit]);
    expect(estimatePence(setCutGrams([], 'brisket', Number.NaN), day)).toBe(0);
  });

  it('sends what was chosen, shows the total, and closes what is taken or has no price', async () => {
    const send = vi.fn();
    render(<Screen send={send} />);
    expect(screen.getByRole<HTMLInputElement>('checkbox', { name: /^Forequarter.*Taken already/ }).disabled).toBe(true);
    expect(screen.queryByRole('checkbox', { name: /^Side/ })).toBeNull();
    fireEvent.click(screen.getByRole('checkbox', { name: /^Hindquarter, 78.0 kg/ }));
    fireEvent.change(screen.getByLabelText(/^Brisket/), { target: { value: '10' } });
    fireEvent.change(screen.getByLabelText(/^Note to the cutter/), { target: { value: 'Chine bone off' } });
    expect(screen.getByText('£656.60')).toBeTruthy();
    fireEvent.click(screen.getByRole('button', { name: 'Reserve' }));
    await waitFor(() => expect(send).toHaveBeenCalledOnce());
    expect(send.mock.calls[0]?.[0]).toEqual({
      requestKey: CARCASE,
      dayId: DAY,
      cuttingNote: 'Chine bone off',
      lines: [
        { kind: 'unit', unitKind: 'hind', carcaseId: CARCASE, side: 'left' },
        { kind: 'cut', cutId: 'brisket', grams: 10_000 },
      ],
    });
  });

  it('with nothing chosen, says so and sends nothing', async () => {
    const send = vi.fn();
    render(<Screen send={send} />);
    fireEvent.click(screen.getByRole('button', { name: 'Reserve' }));
    expect((await screen.findByText('Choose at least one line.')).textContent).toBeTruthy();
    expect(send).not.toHaveBeenCalled();
  });

  it('when a weight is no number, says so beside the field and sends nothing', async () => {
    const send = vi.fn();
    render(<Screen send={send} />);
    fireEvent.change(screen.getByLabelText(/^Brisket/), { target: { value: 'ten' } });
    expect(screen.getByText('Give kilograms, such as 4.25.')).toBeTruthy();
    fireEvent.click(screen.getByRole('button', { name: 'Reserve' }));
    expect(await screen.findByText(/One of the weights is not right/)).toBeTruthy();
    expect(send).not.toHaveBeenCalled();
  });
});
