import { queryOptions, useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { CheckoutForm } from '#shared/contracts/checkout-form-schema.ts';
import { askDelivery } from '#shared/contracts/delivery.ts';
import type { BasketLine, Checkout } from '#shared/contracts/orders.ts';
import { checkPromo } from '#shared/contracts/promo.ts';
import { deliveryPenceOf, formatPostcode, readPostcode } from '#shared/domain/delivery.ts';
import { depositOf } from '#shared/domain/deposit.ts';
import { AppError } from '#shared/errors.ts';
import { call } from './api.ts';
import { STALE } from './query-client.ts';

export function deliveryQuery(dayId: string, postcode: string) {
  return queryOptions({
    queryKey: ['collections', dayId, 'van', postcode],
    queryFn: ({ signal }) => call(askDelivery, { query: { dayId, postcode }, signal }),
    staleTime: STALE.stock,
  });
}

export function promoQuery(dayId: string, lines: BasketLine[], code: string) {
  return queryOptions({
    queryKey: ['basket', dayId, lines, 'promo', code],
    queryFn: ({ signal }) => call(checkPromo, { body: { dayId, lines, code }, signal }),
    staleTime: STALE.stock,
  });
}

type Choice = Pick<CheckoutForm, 'way' | 'pay'>;
type Basket = { dayId: string | undefined; lines: BasketLine[]; goodsPence: number };

/** What the checkout adds to a basket: the van, a code, a deposit, and what it all comes to. */
export function useCheckout({ dayId = '', lines, goodsPence }: Basket) {
  const [choice, setChoice] = useState<Choice>({ way: 'collect', pay: 'in full' });
  const [typed, setTyped] = useState('');
  const [code, setCode] = useState<string>();
  const postcode = readPostcode(typed);
  const isComplete = dayId !== '' && postcode !== null;
  const van = useQuery({
    ...deliveryQuery(dayId, postcode ? formatPostcode(postcode) : ''),
    enabled: isComplete,
  });
  const promo = useQuery({ ...promoQuery(dayId, lines, code ?? ''), enabled: dayId !== '' && code !== undefined });
  const discountPence = code === undefined ? 0 : (promo.data?.discountPence ?? 0);
  const area = choice.way === 'deliver' && isComplete ? (van.data?.area ?? null) : null;
  const deliveryPence = area ? deliveryPenceOf(area, goodsPence - discountPence) : null;
  const totalPence = goodsPence - discountPence + (deliveryPence ?? 0);
  const depositPence = depositOf(totalPence);
  return {
    choice,
    setChoice,
    setPostcode: setTyped,
    vanAnswer: isComplete ? van.data : undefined,
    promo: {
      taken: code === undefined ? undefined : promo.data,
      isAsking: code !== undefined && promo.isFetching,
      error: code === undefined ? undefined : wordsOf(promo.error),
      use: setCode,
      drop: () => setCode(undefined),
    },
    ...{ discountPence, deliveryPence, totalPence, depositPence },
    duePence: choice.pay === 'deposit' && depositPence !== null ? depositPence : totalPence,
  };
}

function wordsOf(error: Error | null): string | undefined {
  if (!(error instanceof AppError)) return error?.message;
  return error.fields?.promoCode ?? error.fields?.code ?? error.message;
}

/** The order that the filled form asks for. */
export function bodyOf(
  form: CheckoutForm,
  basket: Pick<Checkout, 'basketKey' | 'dayId' | 'lines'> & { promoCode: string | undefined },
): Checkout {
  const { name, email, phone, note, wantsNews, pay } = form;
  const person = { ...basket, name, email, phone, note, wantsNews, pay };
  if (form.way === 'collect') return { ...person, slotId: form.slotId };
  const addressLines = [form.street, form.town].filter((line) => line !== '');
  return { ...person, delivery: { addressLines, postcode: form.postcode } };
}
