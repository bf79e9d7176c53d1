import { useSyncExternalStore } from 'react';

/** A product rather than an offer: the same box can be moved to another cutting day. */
export type BasketItem = {
  kind: 'box' | 'loose';
  /** The slug of a box, the id of a cut. */
  productId: string;
  name: string;
  quantity: number;
};

export type Basket = {
  /** Goes with the order, so that a second press, another tab or a lost line finds the first order again. */
  key: string;
  /** Everything in a basket is for one cutting day. */
  dayId: string | null;
  items: BasketItem[];
  /** The order that was made of this basket and is not paid yet. */
  orderToken: string | null;
  /** From the waiting list: one box of this basket is kept for whoever has this token. */
  keptToken: string | null;
};

const STORE = 'basket-1';
const MOST_OF_ONE = 99;
const EMPTY: Basket = { key: '', dayId: null, items: [], orderToken: null, keptToken: null };

const listeners = new Set<() => void>();
let current: { text: string | null; basket: Basket } = { text: null, basket: EMPTY };
/** Holds the basket where storage is refused, as in some private windows; it then lasts as long as the page. */
let unsaved: string | null = null;

function readText(): string | null {
  try {
    return localStorage.getItem(STORE) ?? unsaved;
  } catch {
    return unsaved;
  }
}

/** Same text, same object: React compares snapshots by identity. */
function read(): Basket {
  const text = readText();
  if (text !== current.text) current = { text, basket: parse(text) };
  return current.basket;
}

function parse(text: string | null): Basket {
  if (!text) return EMPTY;
  try {
    const stored = JSON.parse(text) as Partial<Basket>;
    if (!Array.isArray(stored.items) || typeof stored.key !== 'string') return EMPTY;
    return {
      key: stored.key,
      dayId: stored.dayId ?? null,
      items: stored.items.filter(isItem),
      orderToken: stored.orderToken ?? null,
      keptToken: stored.keptToken ?? null,
    };
  } catch {
    return EMPTY;
  }
}

function isItem(item: Partial<BasketItem>): item is BasketItem {
  return (
    (item.kind === 'box' || item.kind === 'loose') &&
    typeof item.productId === 'string' &&
    typeof item.name === 'string' &&
    Number.isInteger(item.quantity) &&
    Number(item.quantity) > 0
  );
}

function write(change: (basket: Basket) => Basket): void {
  const before = read();
  const basket = change(before.key ? before : { ...before, key: crypto.randomUUID() });
  const text = JSON.stringify(basket);
  try {
    localStorage.setItem(STORE, text);
    unsaved = null;
  } catch {
    unsaved = text;
  }
  listeners.forEach((tell) => tell());
}

function subscribe(onChange: () => void): () => void {
  const fromOtherTab = (event: StorageEvent) => {
    if (event.key !== STORE && event.key !== null) return;
    onChange();
  };
  listeners.add(onChange);
  window.addEventListener('storage', fromOtherTab);
  return () => {
    listeners.delete(onChange);
    window.removeEventListener('storage', fromOtherTab);
  };
}

function isSame(one: BasketItem, other: Pick<BasketItem, 'kind' | 'productId'>): boolean {
  return one.kind === other.kind && one.productId === other.productId;
}

/** Sets how many of a product; none takes it out. */
export function setQuantity(item: Omit<BasketItem, 'quantity'>, quantity: number): void {
  const wanted = Math.min(Math.max(quantity, 0), MOST_OF_ONE);
  write((basket) => {
    const isKnown = basket.items.some((one) => isSame(one, item));
    const items = isKnown
      ? basket.items.map((one) => (isSame(one, item) ? { ...one, quantity: wanted } : one))
      : [...basket.items, { ...item, quantity: wanted }];
    return { ...basket, items: items.filter((one) => one.quantity > 0) };
  });
}

/** Puts a former order's things into the basket for a day, beside what is there already. */
export function fillBasket(dayId: string, items: readonly BasketItem[]): void {
  chooseDay(dayId);
  for (const item of items) setQuantity(item, Math.max(item.quantity, quantityOf(read(), item)));
}

export function chooseDay(dayId: string): void {
  write((basket) => ({ ...basket, dayId }));
}

/** Remembers the token of a box that the waiting list keeps, for the basket's price and for the order. */
export function noteKept(token: string): void {
  write((basket) => ({ ...basket, keptToken: token }));
}

/** What an order of this basket says of the waiting list. */
export function keptBox(): { waitingToken?: string } {
  const { keptToken } = read();
  return keptToken ? { waitingToken: keptToken } : {};
}

/** Remembers the order that waits for payment, so that the basket can be emptied once it is paid. */
export function noteOrder(token: string): void {
  write((basket) => ({ ...basket, orderToken: token }));
}

/** The order of this basket came to an end: paid (start afresh) or given up (keep the things, under a new key). */
export function settleOrder(token: string, outcome: 'paid' | 'given up'): void {
  if (read().orderToken !== token) return;
  write((basket) => ({
    ...basket,
    key: crypto.randomUUID(),
    items: outcome === 'paid' ? [] : basket.items,
    orderToken: null,
    keptToken: null,
  }));
}

/** A new key for the same things, when the order of the former one is over. Answers the key. */
export function renewKey(): string {
  const key = crypto.randomUUID();
  write((basket) => ({ ...basket, key, orderToken: null }));
  return key;
}

export function quantityOf(basket: Basket, item: Pick<BasketItem, 'kind' | 'productId'>): number {
  return basket.items.find((one) => isSame(one, item))?.quantity ?? 0;
}

export function countOf(basket: Basket): number {
  return basket.items.reduce((sum, item) => sum + item.quantity, 0);
}

/** The basket of this browser, the same in all its tabs. Empty on the server and while the page comes to life. */
export function useBasket(): Basket {
  return useSyncExternalStore(subscribe, read, () => EMPTY);
}

/** False until the basket could be read: the page must not call a full basket empty. */
export function useIsBasketRead(): boolean {
  return useSyncExternalStore(
    subscribe,
    () => true,
    () => false,
  );
}
