import { describe, expect, it } from 'vitest';
import { standingOf, whenWords } from '#components/orders/order-words.ts';
import { makeOrderView } from '#tests/support/make-shop.ts';

const waiting = makeOrderView({
  state: 'awaiting payment',
  paymentState: 'unpaid',
  paymentUrl: 'http://127.0.0.1:8090/pay/1',
  paymentExpiresAt: '2026-12-01T12:31:00.000Z',
});

describe('how an order stands', () => {
  it('paid, says when and where to collect it', () => {
    expect(standingOf(makeOrderView(), false).lead).toContain('Fri 11 Dec, 14:00–14:30, The farm gate');
  });

  it('back from the payment page without word of it, waits and promises nothing', () => {
    const { title, lead } = standingOf(waiting, false);
    expect(title).toBe('Waiting for the payment.');
    expect(lead).toContain('held until 12:31');
  });

  it('left without paying, says so and until when it is held', () => {
    expect(standingOf(waiting, true)).toMatchObject({ title: 'Not paid yet.', badge: 'Held' });
  });

  it('with its payment page closed, says that nothing is held and nothing was charged', () => {
    const { lead, kind } = standingOf({ ...waiting, paymentUrl: null, paymentExpiresAt: null }, false);
    expect(lead).toContain('nothing is held and nothing was charged');
    expect(kind).toBe('quiet');
  });

  it('cancelled before it was paid, says that nothing was charged', () => {
    expect(standingOf(makeOrderView({ state: 'cancelled', paymentState: 'unpaid' }), false).lead).toBe(
      'Nothing was charged.',
    );
  });

  it('cancelled while the refund is on its way, does not claim that it arrived', () => {
    const { lead } = standingOf(makeOrderView({ state: 'cancelled', paymentState: 'paid' }), false);
    expect(lead).toContain('£102.40 is on its way back');
  });

  it('cancelled and refunded, names the sum that went back', () => {
    const order = makeOrderView({ state: 'cancelled', paymentState: 'refunded', refundedPence: 10_240 });
    expect(standingOf(order, false).lead).toBe('£102.40 went back to the card that paid.');
  });

  it('in summer, tells times by the clock of the farm', () => {
    const summer = { startsAt: '2026-07-03T14:00:00.000Z', endsAt: '2026-07-03T14:30:00.000Z' };
    expect(whenWords({ ...makeOrderView().collection, ...summer })).toBe('Fri 3 Jul, 15:00–15:30');
  });
});
