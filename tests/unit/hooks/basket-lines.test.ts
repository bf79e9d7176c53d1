import { describe, expect, it } from 'vitest';
import { chosenItems, dayOfBasket } from '#hooks/basket-lines.ts';
import type { Basket } from '#hooks/use-basket.ts';
import { makeCounter, THURSDAY, WEEK_LATER } from '#tests/support/make-shop.ts';

function basketOf(dayId: string | null, quantity = 1): Basket {
  return {
    key: 'key',
    dayId,
    items: [
      { kind: 'box', productId: 'ember', name: 'Ember', quantity },
      { kind: 'loose', productId: 'mince', name: 'Mince', quantity: 2 },
    ],
    orderToken: null,
    keptToken: null,
  };
}

describe('the day of a basket', () => {
  const { home } = makeCounter();

  it('chosen and still open, stays', () => {
    expect(dayOfBasket(basketOf(WEEK_LATER), home.days)?.id).toBe(WEEK_LATER);
  });

  it('not chosen yet, is the next one', () => {
    expect(dayOfBasket(basketOf(null), home.days)?.id).toBe(THURSDAY);
  });

  it('closed meanwhile, gives way to the next open one', () => {
    const days = home.days.map((day) => ({ ...day, isInTime: day.id !== THURSDAY }));
    expect(dayOfBasket(basketOf(THURSDAY), days)?.id).toBe(WEEK_LATER);
  });

  it('with every day closed, is none', () => {
    const days = home.days.map((day) => ({ ...day, isInTime: false }));
    expect(dayOfBasket(basketOf(THURSDAY), days)).toBeUndefined();
  });
});

describe('the things in a basket', () => {
  it('find their offers of the day, with prices by the piece', () => {
    const [ember, mince] = chosenItems(basketOf(THURSDAY), THURSDAY, makeCounter());
    expect(ember?.line).toMatchObject({ free: 2, unitPricePence: 10_240, linePence: 10_240, unitGrams: 4_000 });
    expect(mince?.line).toMatchObject({ kind: 'loose', quantity: 2, linePence: 980, unitGrams: 500 });
  });

  it('of which too few are left, name another open day that has enough', () => {
    const [ember] = chosenItems(basketOf(THURSDAY, 3), THURSDAY, makeCounter());
    expect(ember?.line?.free).toBe(2);
    expect(ember?.elsewhere.map((offer) => offer.dayId)).toEqual([WEEK_LATER]);
  });

  it('that no other day has enough of, name none', () => {
    const [ember] = chosenItems(basketOf(THURSDAY, 50), THURSDAY, makeCounter());
    expect(ember?.elsewhere).toEqual([]);
  });

  it('that left the counter, have no line', () => {
    const { home, cuts } = makeCounter();
    const [ember] = chosenItems(basketOf(THURSDAY), THURSDAY, { home: { ...home, boxes: [] }, cuts });
    expect(ember?.line).toBeUndefined();
  });
});
