import { describe, expect, test } from 'vitest';
import { paymentStateOf, refundablePence, refundParts, type MoneyRow } from '#shared/domain/refunds.ts';

const charge = (id: string, amountPence: number): MoneyRow => ({
  ...{ id, kind: 'charge', amountPence, state: 'done', chargeId: null },
});
const refund = (id: string, amountPence: number, more: Partial<MoneyRow> = {}): MoneyRow => ({
  ...{ id, kind: 'refund', amountPence, state: 'done', chargeId: 'a' },
  ...more,
});

describe('the payment state of an order', () => {
  test.each([
    ['nothing yet', [], 'unpaid'],
    ['one charge', [charge('a', 900)], 'paid'],
    ['a refund that is only asked for', [charge('a', 900), refund('r', 900, { state: 'asked' })], 'paid'],
    ['a refund that failed', [charge('a', 900), refund('r', 900, { state: 'failed' })], 'paid'],
    ['part of it back', [charge('a', 900), refund('r', 100)], 'refunded in part'],
    ['all of it back, in two parts', [charge('a', 900), refund('r', 100), refund('s', 800)], 'refunded'],
  ] as const)('with %s', (_name, rows, state) => {
    expect(paymentStateOf(rows)).toBe(state);
  });

  test('with a deposit and the rest still to come, is part paid', () => {
    expect(paymentStateOf([charge('a', 900)], true)).toBe('part paid');
    expect(paymentStateOf([], true)).toBe('unpaid');
  });
});

test('what may still go back counts refunds that are asked for, and not those that failed', () => {
  const failed = refund('t', 700, { state: 'failed' });
  expect(refundablePence([charge('a', 900), refund('r', 100, { state: 'asked' }), refund('s', 50), failed])).toBe(750);
});

describe('the charges that a refund comes from', () => {
  test('are the newest first: what was paid last goes back whole', () => {
    expect(refundParts([charge('a', 900), charge('b', 900)], 900)).toEqual([{ chargeId: 'b', amountPence: 900 }]);
  });

  test('are several, when no single one covers it', () => {
    const rows = [charge('a', 9_400), charge('b', 1_300), refund('r', 300, { chargeId: 'b' })];
    expect(refundParts(rows, 10_400)).toEqual([
      { chargeId: 'b', amountPence: 1_000 },
      { chargeId: 'a', amountPence: 9_400 },
    ]);
  });

  test('leave out a charge that has gone back, and count what failed as still there', () => {
    const rows = [charge('a', 900), charge('b', 900), refund('r', 900, { chargeId: 'b' })];
    expect(refundParts(rows, 900)).toEqual([{ chargeId: 'a', amountPence: 900 }]);
    expect(refundParts([charge('a', 900), refund('r', 900, { state: 'failed' })], 900)).toEqual([
      { chargeId: 'a', amountPence: 900 },
    ]);
  });

  test('never give more than there is', () => {
    expect(refundParts([charge('a', 900), refund('r', 800)], 500)).toEqual([{ chargeId: 'a', amountPence: 100 }]);
    expect(refundParts([charge('a', 900), refund('r', 900)], 1)).toEqual([]);
    expect(refundParts([], 1)).toEqual([]);
  });
});
