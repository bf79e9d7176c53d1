import type Stripe from 'stripe';
import { makeRefund } from '../payments/refund.ts';
import type { Fake } from '../fake.ts';
import { idOf } from '../store.ts';
import type { Handler } from './endpoint.ts';
import { invalidRequest, noSuchObject, noSuchReference } from './faults.ts';
import { listPage, readCreated, readFilter } from './lists.ts';
import type { Params } from './params.ts';

const reasons = ['duplicate', 'fraudulent', 'requested_by_customer'] as const;

function readCharge(fake: Fake, params: Params): Stripe.Charge {
  const [chargeId, intentId] = [params.text('charge'), params.text('payment_intent')];
  if (chargeId === null && intentId === null) {
    throw invalidRequest('One of the following params should be provided for this request: payment_intent or charge.');
  }
  if (chargeId !== null) {
    const charge = fake.store.charges.get(chargeId);
    if (!charge) throw noSuchReference('charge', chargeId, 'charge');
    return charge;
  }
  const id = String(intentId);
  const intent = fake.store.intents.get(id)?.intent;
  if (!intent) throw noSuchReference('payment_intent', id, 'payment_intent');
  const charge = fake.store.charges.get(idOf(intent.latest_charge));
  if (charge && intent.status === 'succeeded') return charge;
  throw invalidRequest(`This PaymentIntent (${id}) does not have a successful charge to refund.`, {
    param: 'payment_intent',
  });
}

export function createRefund(fake: Fake): Handler {
  return ({ params }) => {
    const charge = readCharge(fake, params);
    const order = {
      amount: params.integer('amount', { min: 1, max: 99_999_999 }),
      reason: params.oneOf('reason', reasons),
      metadata: params.metadata(),
    };
    params.refuseUnknown();
    return makeRefund(fake, charge, order);
  };
}

export function retrieveRefund(fake: Fake): Handler {
  return ({ params, id }) => {
    params.refuseUnknown();
    const record = fake.store.refunds.get(id);
    if (!record) throw noSuchObject('refund', id);
    return record.refund;
  };
}

export function listRefunds(fake: Fake): Handler {
  return ({ params }) => {
    const filters = [readCreated(params), readFilter(params, 'charge'), readFilter(params, 'payment_intent')];
    const newestFirst = [...fake.store.refunds.values()].map((record) => record.refund).reverse();
    const found = newestFirst.filter((refund) => filters.every((filter) => filter(refund)));
    const page = listPage(found, params, '/v1/refunds');
    params.refuseUnknown();
    return page;
  };
}
