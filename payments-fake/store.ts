import { mkdirSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import type Stripe from 'stripe';

/** On the wire a decimal is text; the SDK turns it into its own Decimal. */
export type WireLineItem = Omit<Stripe.LineItem, 'price'> & {
  price: Omit<Stripe.Price, 'unit_amount_decimal'> & { unit_amount_decimal: string };
};

export type IntentDetails = {
  description: string | null;
  metadata: Record<string, string>;
  receiptEmail: string | null;
  setupFutureUsage: 'off_session' | 'on_session' | null;
};

export type Payer = { email: string | null; name: string | null };

/** What the page says about the last try: the sentence, and the field it belongs to. */
type PaymentProblem = { field: string; message: string };

export type CheckoutRecord = {
  session: Stripe.Checkout.Session;
  lineItems: WireLineItem[];
  details: IntentDetails;
  payer: Payer;
  /** The form that was sent last: a second tap on Pay sends the same form again. */
  lastForm: string | null;
  problem: PaymentProblem | null;
};

export type IntentRecord = { intent: Stripe.PaymentIntent; sessionId: string | null; returnUrl: string | null };
export type CardRecord = { method: Stripe.PaymentMethod; token: string; isSetUp: boolean };
export type RefundRecord = { refund: Stripe.Refund; settlesAt: number | null; settlesTo: 'succeeded' | 'failed' };
export type KeptAnswer = { endpoint: string; fingerprint: string; status: number; body: string; requestId: string };

/** One event on its way to the webhook address. Times are milliseconds of the real clock. */
export type Delivery = { id: string; eventId: string; attempts: number; dueAt: number; isGivenUp: boolean };

/** Every table is kept oldest first. */
type Tables = {
  checkouts: Map<string, CheckoutRecord>;
  intents: Map<string, IntentRecord>;
  charges: Map<string, Stripe.Charge>;
  refunds: Map<string, RefundRecord>;
  customers: Map<string, Stripe.Customer>;
  cards: Map<string, CardRecord>;
  events: Map<string, Stripe.EventBase>;
  deliveries: Map<string, Delivery>;
  answers: Map<string, KeptAnswer>;
};

export type Store = Tables & {
  /** Says that a table changed: the file is written once the present request is done. */
  changed: () => void;
  writeNow: () => void;
};

type Saved = { [Name in keyof Tables]: [string, Tables[Name] extends Map<string, infer Row> ? Row : never][] };

const nothing: Saved = {
  checkouts: [],
  intents: [],
  charges: [],
  refunds: [],
  customers: [],
  cards: [],
  events: [],
  deliveries: [],
  answers: [],
};

function readSaved(file: string): Saved {
  try {
    return JSON.parse(readFileSync(file, 'utf8')) as Saved;
  } catch (error) {
    if (error instanceof Error && 'code' in error && error.code === 'ENOENT') return nothing;
    throw error;
  }
}

function restore(saved: Saved): Tables {
  return {
    checkouts: new Map(saved.checkouts),
    intents: new Map(saved.intents),
    charges: new Map(saved.charges),
    refunds: new Map(saved.refunds),
    customers: new Map(saved.customers),
    cards: new Map(saved.cards),
    events: new Map(saved.events),
    deliveries: new Map(saved.deliveries),
    answers: new Map(saved.answers),
  };
}

/** Without a folder everything stays in memory. */
export function openStore(dir?: string): Store {
  if (dir === undefined) return { ...restore(nothing), changed: () => undefined, writeNow: () => undefined };
  mkdirSync(dir, { recursive: true });
  const file = path.join(dir, 'state.json');
  const tables = restore(readSaved(file));
  let isWaiting = false;
  function writeNow() {
    isWaiting = false;
    const saved = Object.fromEntries(Object.entries(tables).map(([name, table]) => [name, [...table]]));
    writeFileSync(`${file}.new`, JSON.stringify(saved));
    renameSync(`${file}.new`, file);
  }
  function changed() {
    if (isWaiting) return;
    isWaiting = true;
    setImmediate(() => {
      if (isWaiting) writeNow();
    });
  }
  return { ...tables, changed, writeNow };
}

/** The id of what a member names, expanded or not; empty when it names nothing. */
export function idOf(value: string | { id: string } | null): string {
  return typeof value === 'string' ? value : (value?.id ?? '');
}

/** Finds what an id stands for, by its prefix. */
export function findObject(store: Store, id: string): object | undefined {
  switch (id.split('_')[0]) {
    case 'cs':
      return store.checkouts.get(id)?.session;
    case 'pi':
      return store.intents.get(id)?.intent;
    case 'ch':
      return store.charges.get(id);
    case 're':
      return store.refunds.get(id)?.refund;
    case 'cus':
      return store.customers.get(id);
    case 'pm':
      return store.cards.get(id)?.method;
    default:
      return undefined;
  }
}
