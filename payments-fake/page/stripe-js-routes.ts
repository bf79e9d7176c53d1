import express, { type RequestHandler, type Router } from 'express';
import type { Fake } from '../fake.ts';
import { answerAuthentication, attemptPayment } from '../payments/attempt.ts';
import type { IntentRecord } from '../store.ts';
import { stripeScript } from './stripe-js.ts';

/** The browser's half: its script and the calls that it makes, from pages of any origin, known by the client secret. */
export function stripeJsRoutes(fake: Fake): Router {
  const router = express.Router();
  router.use('/stripe-js', allowOthers, express.json({ limit: '20kb' }));
  router.get('/stripe.js', (_request, response) => {
    response.type('text/javascript').send(stripeScript(fake.url));
  });
  router.post('/stripe-js/confirm', confirm(fake));
  router.post('/stripe-js/authenticate', authenticate(fake));
  return router;
}

const allowOthers: RequestHandler = (request, response, next) => {
  response.setHeader('Access-Control-Allow-Origin', '*');
  response.setHeader('Access-Control-Allow-Headers', 'content-type');
  if (request.method === 'OPTIONS') response.status(204).end();
  else next();
};

function textIn(body: unknown, name: string): string {
  const value = body !== null && typeof body === 'object' ? (body as Record<string, unknown>)[name] : undefined;
  return typeof value === 'string' ? value : '';
}

function findBySecret(fake: Fake, secret: string): IntentRecord | undefined {
  return [...fake.store.intents.values()].find(({ intent }) => intent.client_secret === secret);
}

/** As the script hands it to the page: the payment, or the error in words for the payer. */
function resultOf(record: IntentRecord | undefined): object {
  if (!record) return { error: { type: 'invalid_request_error', message: 'There is no such payment.' } };
  const { id, status, last_payment_error: error } = record.intent;
  if (error && status === 'requires_payment_method') {
    return { error: { type: error.type, code: error.code, message: error.message } };
  }
  return { paymentIntent: { id, status } };
}

const CONFIRMABLE = ['requires_payment_method', 'requires_confirmation'];

function confirm(fake: Fake): RequestHandler {
  return (request, response) => {
    const record = findBySecret(fake, textIn(request.body, 'clientSecret'));
    const card = fake.store.cards.get(textIn(request.body, 'paymentMethod'));
    if (record && card && CONFIRMABLE.includes(record.intent.status)) {
      attemptPayment(fake, { record, card, isOffSession: false });
    }
    response.json(resultOf(record));
  };
}

function authenticate(fake: Fake): RequestHandler {
  return (request, response) => {
    const record = findBySecret(fake, textIn(request.body, 'clientSecret'));
    if (record) answerAuthentication(fake, record, textIn(request.body, 'answer') === 'complete');
    response.json(resultOf(record));
  };
}
