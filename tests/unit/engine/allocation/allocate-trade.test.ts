import { afterAll, describe, expect, test } from 'vitest';
import { createSolver } from '#server/allocation/solver/solver-pool.ts';
import { allocate } from '#shared/engine/allocation/allocate.ts';
import { ANY_SIDE, makeAllocationInput, makeChoice, makeSide, makeUnitLine } from '#tests/support/make-small-day.ts';

const solver = createSolver({ size: 1 });
afterAll(() => solver.stop());

describe('allocating to the trade', () => {
  test('a confirmed side, leaves whole and none of its primals is cut', async () => {
    const input = makeAllocationInput({
      trade: [makeUnitLine('butcher', { kind: 'side' }, { fit: { ...ANY_SIDE, side: 'right' } })],
    });
    const plan = await allocate(input, solver);
    const right = plan.fates.filter(({ side }) => side === 'right');
    expect(right.every(({ wayId, soldPrimals }) => wayId === null && soldPrimals.length === 1)).toBe(true);
    expect(plan.trade[0]?.units).toMatchObject([{ sideId: 'carcase-1/right', grams: 150_000, incomePence: 75_000 }]);
    expect(plan.cuts.find(({ cutId }) => cutId === 'dice')?.madeGrams).toBeLessThanOrEqual(12_000);
  });

  test('two quarters of one end, come from two sides', async () => {
    const input = makeAllocationInput({
      trade: [makeUnitLine('butcher', { kind: 'quarter', quarter: 'fore' }, { quantity: 2 })],
    });
    const plan = await allocate(input, solver);
    expect(plan.trade[0]?.units.map(({ sideId }) => sideId)).toEqual(['carcase-1/left', 'carcase-1/right']);
    const three = await allocate(
      makeAllocationInput({ trade: [makeUnitLine('butcher', { kind: 'quarter', quarter: 'fore' }, { quantity: 3 })] }),
      solver,
    );
    expect(three.shortfalls).toMatchObject([{ kind: 'trade', id: 'butcher', short: 1, unit: 'units' }]);
  });

  test('of two primals under one choice, one may leave whole while the other is cut the chosen way', async () => {
    const loinRump = makeChoice(
      'loin-rump',
      { 't-bone': {}, steaks: {} },
      {
        quarter: 'hind',
        primals: [
          { primalId: 'loin', name: 'Loin', grams: 12_000, hasVertebrae: true },
          { primalId: 'rump', name: 'Rump', grams: 8_000, hasVertebrae: false },
        ],
        ways: ['t-bone', 'steaks'].map((wayId) => ({
          wayId,
          name: wayId,
          closedReason: null,
          costPence: 100,
          yields: [
            { primalId: 'loin', cutId: wayId === 't-bone' ? 'roast' : 'steak', grams: 9_000 },
            { primalId: 'rump', cutId: 'dice', grams: 6_000 },
          ],
        })),
      },
    );
    const rump = makeUnitLine('butcher', { kind: 'primal', primalId: 'rump' });
    const plan = await allocate(
      makeAllocationInput({ sides: [makeSide('c', 'left', [loinRump])], trade: [rump] }),
      solver,
    );
    expect(plan.fates).toMatchObject([
      { wayId: 'steaks', soldPrimals: [{ primalId: 'rump', tradeLineId: 'butcher' }] },
    ]);
    expect(plan.cuts.find(({ cutId }) => cutId === 'dice')?.madeGrams ?? 0).toBe(0);
    expect(plan.cuts.find(({ cutId }) => cutId === 'steak')?.madeGrams).toBe(9_000);
    // Butchery is shared by weight: the loin is 12 of 20 kg.
    expect(plan.money.butcheryPence).toBe(60);
  });

  test('a unit with vertebrae of an old carcase, and one whose instruction is closed, do not fit', async () => {
    const rib = makeChoice(
      'rib',
      { bone: { roast: 9_000 }, boned: { steak: 5_000 } },
      {
        primals: [{ primalId: 'rib', name: 'Rib', grams: 10_000, hasVertebrae: true }],
        closed: { bone: 'Over thirty months.' },
      },
    );
    const old = makeSide('c', 'left', [rib], { closedUnitReason: 'Over thirty months.' });
    const whole = makeAllocationInput({ sides: [old], trade: [makeUnitLine('t', { kind: 'side' })] });
    await expect(allocate(whole, solver)).resolves.toMatchObject({ shortfalls: [{ id: 't', short: 1 }] });
    const chuck = makeSide('c', 'left', [
      makeChoice('chuck', { diced: { dice: 9_000 }, bone: { roast: 9_000 } }, { closed: { bone: 'Closed.' } }),
    ]);
    const unit = { kind: 'primal', primalId: 'chuck' } as const;
    const instructed = makeUnitLine('t', unit, { instructions: [{ choiceId: 'chuck', wayId: 'bone' }] });
    await expect(allocate(makeAllocationInput({ sides: [chuck], trade: [instructed] }), solver)).resolves.toMatchObject(
      {
        shortfalls: [{ id: 't', short: 1 }],
      },
    );
    await expect(
      allocate(makeAllocationInput({ sides: [chuck], trade: [makeUnitLine('t', unit)] }), solver),
    ).resolves.toMatchObject({
      shortfalls: [],
    });
  });

  test('an unconfirmed cut line, is filled only where it pays; a confirmed one is met at a loss', async () => {
    const line = {
      id: 't',
      name: 't',
      kind: 'cut',
      cutId: 'dice',
      grams: 5_000,
      priority: 1,
      tenthPencePerKg: 1_000,
    } as const;
    const idle = await allocate(makeAllocationInput({ boxes: [], trade: [{ ...line, isConfirmed: false }] }), solver);
    expect(idle.trade).toMatchObject([{ cutGrams: 0, short: 0 }]);
    const met = await allocate(makeAllocationInput({ boxes: [], trade: [{ ...line, isConfirmed: true }] }), solver);
    expect(met.trade).toMatchObject([{ cutGrams: 5_000, short: 0, incomePence: 500 }]);
  });
});
