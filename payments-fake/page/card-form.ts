import type { CardForm } from '../payments/checkout.ts';
import type { Fake } from '../fake.ts';
import type { CheckoutRecord } from '../store.ts';
import { findCardByNumber, hasRightCheckDigit } from '../test-cards.ts';

export type FieldName = 'email' | 'name' | 'card' | 'expiry' | 'cvc';
export type Typed = Partial<Record<FieldName | 'formId', string>>;
export type FieldErrors = Partial<Record<string, string>>;
export type Reading = { ok: true; form: CardForm } | { ok: false; errors: FieldErrors };

/** How far ahead a card's last month may lie. */
const mostYearsAhead = 50;

export function readTyped(body: unknown): Typed {
  const values = new Map(body !== null && typeof body === 'object' ? Object.entries(body) : []);
  const typed: Typed = {};
  for (const name of ['email', 'name', 'card', 'expiry', 'cvc', 'formId'] as const) {
    const value: unknown = values.get(name);
    if (typeof value === 'string') typed[name] = value.trim();
  }
  return typed;
}

function readExpiry(text: string): { month: number; year: number } | null {
  const match = /^(\d{1,2})\s*[/-]?\s*(\d{2}|20\d{2})$/.exec(text);
  if (!match) return null;
  const [month, year] = [Number(match[1]), Number(match[2])];
  return month >= 1 && month <= 12 ? { month, year: year < 100 ? 2000 + year : year } : null;
}

function expiryError(text: string, now: number): string | null {
  const expiry = readExpiry(text);
  if (!expiry) return 'Give the month and year on the card, such as 08 / 30.';
  const today = new Date(now * 1000);
  const monthsAhead = (expiry.year - today.getUTCFullYear()) * 12 + expiry.month - (today.getUTCMonth() + 1);
  if (monthsAhead < 0) return 'This card has expired: its last month is past.';
  return monthsAhead > mostYearsAhead * 12 ? 'Give the year on the card.' : null;
}

function cardError(number: string): string | null {
  if (number === '') return 'Give the card number.';
  return hasRightCheckDigit(number) ? null : 'This card number is not valid. Check its figures.';
}

/** What is wrong with each field, or the form as the payment needs it. */
export function readCardForm(fake: Fake, { session }: CheckoutRecord, typed: Typed): Reading {
  const email = session.customer_details?.email ?? typed.email ?? '';
  const number = (typed.card ?? '').replace(/[\s-]/g, '');
  const expiry = readExpiry(typed.expiry ?? '');
  const found: [FieldName, string | null][] = [
    ['email', /^\S+@\S+\.\S+$/.test(email) ? null : 'Give an e-mail address, such as name@example.com.'],
    ['card', cardError(number)],
    ['expiry', expiryError(typed.expiry ?? '', fake.now())],
    ['cvc', /^\d{3,4}$/.test(typed.cvc ?? '') ? null : 'Give the three figures on the back of the card.'],
    ['name', typed.name ? null : 'Give the name on the card.'],
  ];
  const errors: FieldErrors = {};
  for (const [name, message] of found) if (message !== null) errors[name] = message;
  if (expiry === null || Object.keys(errors).length > 0) return { ok: false, errors };
  const payer = { email, name: typed.name ?? null };
  return { ok: true, form: { formId: typed.formId ?? '', payer, card: findCardByNumber(number), expiry } };
}
