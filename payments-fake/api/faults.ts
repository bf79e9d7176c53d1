import type Stripe from 'stripe';
import type { Decline } from '../test-cards.ts';

type FaultBody = {
  type: 'api_error' | 'card_error' | 'idempotency_error' | 'invalid_request_error';
  message: string;
  code?: string;
  param?: string;
  decline_code?: string;
  charge?: string;
  payment_intent?: Stripe.PaymentIntent;
  payment_method?: Stripe.PaymentMethod;
};

/** An answer that refuses, in the shape of the API's error object. */
export class Fault extends Error {
  readonly status: number;
  readonly body: FaultBody;

  constructor(status: number, body: FaultBody) {
    super(body.message);
    this.status = status;
    this.body = body;
  }
}

export function invalidRequest(message: string, more: { code?: string; param?: string } = {}): Fault {
  return new Fault(400, { type: 'invalid_request_error', message, ...more });
}

/** The id in the address names nothing. */
export function noSuchObject(what: string, id: string): Fault {
  const body = { code: 'resource_missing', param: 'id', message: `No such ${what}: '${id}'` };
  return new Fault(404, { type: 'invalid_request_error', ...body });
}

/** A parameter names nothing. */
export function noSuchReference(what: string, id: string, param: string): Fault {
  return invalidRequest(`No such ${what}: '${id}'`, { code: 'resource_missing', param });
}

export function declined(decline: Decline, intent: Stripe.PaymentIntent): Fault {
  const failure = intent.last_payment_error;
  return new Fault(402, {
    type: 'card_error',
    message: decline.message,
    code: decline.code,
    decline_code: decline.declineCode,
    payment_intent: intent,
    ...(failure?.charge === undefined ? {} : { charge: failure.charge }),
    ...(failure?.payment_method === undefined ? {} : { payment_method: failure.payment_method }),
  });
}
