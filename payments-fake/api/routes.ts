import express, { type Router } from 'express';
import type { Fake } from '../fake.ts';
import * as sessions from './checkout-sessions.ts';
import { endpoint, type Handler } from './endpoint.ts';
import { answerFault, nameRequest, outage, requireSecretKey, unknownAddress } from './gate.ts';
import * as intents from './payment-intents.ts';
import * as records from './records.ts';
import * as refunds from './refunds.ts';

type Table = Record<string, (fake: Fake) => Handler>;

const reads: Table = {
  '/checkout/sessions': sessions.listSessions,
  '/checkout/sessions/:id': sessions.retrieveSession,
  '/checkout/sessions/:id/line_items': sessions.listLineItems,
  '/payment_intents': intents.listIntents,
  '/payment_intents/:id': intents.retrieveIntent,
  '/refunds': refunds.listRefunds,
  '/refunds/:id': refunds.retrieveRefund,
  '/charges': records.listCharges,
  '/charges/:id': records.retrieveCharge,
  '/customers': records.listCustomers,
  '/customers/:id': records.retrieveCustomer,
  '/payment_methods': records.listCards,
  '/payment_methods/:id': records.retrieveCard,
  '/events': records.listEvents,
  '/events/:id': records.retrieveEvent,
};

const writes: Table = {
  '/checkout/sessions': sessions.createSession,
  '/checkout/sessions/:id/expire': sessions.expireSession,
  '/payment_intents': intents.createIntent,
  '/payment_intents/:id/confirm': intents.confirmIntent,
  '/payment_intents/:id/cancel': intents.cancelOneIntent,
  '/refunds': refunds.createRefund,
  '/customers': records.createCustomer,
};

/** Everything under /v1. */
export function apiRoutes(fake: Fake): Router {
  const router = express.Router();
  router.use(nameRequest, outage(fake), requireSecretKey(fake));
  router.use(express.urlencoded({ extended: true, limit: '1mb', parameterLimit: 5000 }));
  for (const [path, handler] of Object.entries(reads)) router.get(path, endpoint(fake, handler(fake)));
  for (const [path, handler] of Object.entries(writes)) router.post(path, endpoint(fake, handler(fake)));
  router.use(unknownAddress, answerFault);
  return router;
}
