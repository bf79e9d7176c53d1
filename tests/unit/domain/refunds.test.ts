import { describe, expect, test } from 'vitest';
import { chargeForRefund, paymentStateOf, refundablePence, type MoneyRow } from '#shared/domain/refunds.ts';

const charge = (id: string, amountPence: number): MoneyRow => ({ id, kind: 'charge', amountPence, state: 'done' });
const refund = (id: string, amountPence: number, state: MoneyRow['state'] = 'done'): MoneyRow => ({
  ...{ id, kind: 'refund', amountPence, state },
});

describe('the payment state of an order', () => {
  test.each([
    ['nothing yet', [], 'unpaid'],
    ['one charge', [charge('a', 900)], 'paid'],
    ['a refund that is only asked for', [charge('a', 900), refund('r', 900, 'asked')], 'paid'],
    ['a refund that failed', [charge('a', 900), refund('r', 900, 'failed')], 'paid'],
    ['part of it back', [charge('a', 900), refund('r', 100)], 'refunded in part'],
    ['all of it back, in two parts', [charge('a', 900), refund('r', 100), refund('s', 800)], 'refunded'],
  ] as const)('with %s', (_name, rows, state) => {
    expect(paymentStateOf(rows)).toBe(state);
  });
});

test('what may still go back counts refunds that are asked for, and not those that failed', () => {
  const rows = [charge('a', 900), refund('r', 100, 'asked'), refund('s', 50), refund('t', 700, 'failed')];
  expect(refundablePence(rows)).toBe(750);
});

describe('the charge that a refund comes from', () => {
  test('is the newest that covers it: a late second payment goes back whole', () => {
    const rows = [charge('first', 900), charge('late', 900), refund('r', 900, 'asked')];
    expect(chargeForRefund(rows, 'r')?.id).toBe('late');
  });

  test('is the first, once the late one has gone back', () => {
    const rows = [charge('first', 900), charge('late', 900), refund('r', 900), refund('s', 900, 'asked')];
    expect(chargeForRefund(rows, 's')?.id).toBe('first');
  });

  test('passes over refunds that failed, but answers for a failed one that is tried again', () => {
    const rows = [charge('a', 900), refund('r', 900, 'failed'), refund('s', 900, 'asked')];
    expect(chargeForRefund(rows, 's')?.id).toBe('a');
    expect(chargeForRefund(rows, 'r')?.id).toBe('a');
  });

  test('is none when no charge covers it or the refund is unknown', () => {
    expect(chargeForRefund([charge('a', 900), refund('r', 901, 'asked')], 'r')).toBeNull();
    expect(chargeForRefund([charge('a', 900), refund('r', 900), refund('s', 1, 'asked')], 's')).toBeNull();
    expect(chargeForRefund([charge('a', 900)], 'x')).toBeNull();
  });
});
