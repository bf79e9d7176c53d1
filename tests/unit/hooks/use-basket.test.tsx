// @vitest-environment happy-dom
import { act, cleanup, renderHook } from '@testing-library/react';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import {
  chooseDay,
  countOf,
  noteOrder,
  quantityOf,
  renewKey,
  setQuantity,
  settleOrder,
  useBasket,
} from '#hooks/use-basket.ts';

const hearth = { kind: 'box' as const, productId: 'hearth-5', name: 'Hearth, 5 kg' };
const mince = { kind: 'loose' as const, productId: 'mince', name: 'Mince' };
const STORE = 'basket-1';

function writtenByAnotherTab(text: string | null): void {
  if (text === null) localStorage.removeItem(STORE);
  else localStorage.setItem(STORE, text);
  window.dispatchEvent(new StorageEvent('storage', { key: STORE, newValue: text }));
}

beforeEach(() => writtenByAnotherTab(null));
afterEach(cleanup);

describe('the basket', () => {
  it('taking two things, counts them and keeps them for the next visit', () => {
    const { result } = renderHook(useBasket);
    act(() => {
      setQuantity(hearth, 1);
      setQuantity(mince, 3);
    });
    expect(countOf(result.current)).toBe(4);
    expect(quantityOf(result.current, mince)).toBe(3);
    expect(localStorage.getItem(STORE)).toContain('hearth-5');
  });

  it('setting a quantity to none, takes the thing out', () => {
    const { result } = renderHook(useBasket);
    act(() => setQuantity(hearth, 2));
    act(() => setQuantity(hearth, 0));
    expect(result.current.items).toEqual([]);
  });

  it('asking for more than ninety-nine, stops there', () => {
    const { result } = renderHook(useBasket);
    act(() => setQuantity(hearth, 500));
    expect(quantityOf(result.current, hearth)).toBe(99);
  });

  it('a change in another tab, is shown in this one', () => {
    const { result } = renderHook(useBasket);
    act(() => setQuantity(hearth, 1));
    const other = JSON.stringify({ ...result.current, items: [{ ...hearth, quantity: 5 }] });
    act(() => writtenByAnotherTab(other));
    expect(quantityOf(result.current, hearth)).toBe(5);
  });

  it('storage that somebody garbled, reads as empty and can be filled again', () => {
    const { result } = renderHook(useBasket);
    act(() => writtenByAnotherTab('{"items":[{"kind":"horse","quantity":-1}],"key":"x"}'));
    expect(result.current.items).toEqual([]);
    act(() => writtenByAnotherTab('not JSON'));
    expect(result.current.items).toEqual([]);
    act(() => setQuantity(mince, 1));
    expect(countOf(result.current)).toBe(1);
  });

  it('the key, stays the same while things and days change', () => {
    const { result } = renderHook(useBasket);
    act(() => setQuantity(hearth, 1));
    const { key } = result.current;
    act(() => {
      setQuantity(mince, 1);
      chooseDay('day');
      noteOrder('token');
    });
    expect(key).toMatch(/^[0-9a-f-]{36}$/);
    expect(result.current).toMatchObject({ key, dayId: 'day', orderToken: 'token' });
  });

  it('once its order is paid, is empty and has a new key', () => {
    const { result } = renderHook(useBasket);
    act(() => {
      setQuantity(hearth, 1);
      noteOrder('token');
    });
    const { key } = result.current;
    act(() => settleOrder('token', 'paid'));
    expect(result.current).toMatchObject({ items: [], orderToken: null });
    expect(result.current.key).not.toBe(key);
  });

  it('when its order was given up, keeps its things under a new key', () => {
    const { result } = renderHook(useBasket);
    act(() => {
      setQuantity(hearth, 1);
      noteOrder('token');
    });
    const { key } = result.current;
    act(() => settleOrder('token', 'given up'));
    expect(countOf(result.current)).toBe(1);
    expect(result.current.key).not.toBe(key);
  });

  it('an order of another basket, leaves this one alone', () => {
    const { result } = renderHook(useBasket);
    act(() => {
      setQuantity(hearth, 1);
      noteOrder('mine');
    });
    const before = result.current;
    act(() => settleOrder('an old order', 'paid'));
    expect(result.current).toBe(before);
  });

  it('renewing the key, forgets the order and keeps the things', () => {
    const { result } = renderHook(useBasket);
    act(() => {
      setQuantity(hearth, 2);
      noteOrder('token');
    });
    let key = '';
    act(() => {
      key = renewKey();
    });
    expect(result.current).toMatchObject({ key, orderToken: null });
    expect(countOf(result.current)).toBe(2);
  });
});
