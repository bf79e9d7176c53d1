import express, { type Request, type RequestHandler, type Response, type Router } from 'express';
import type { Fake } from '../fake.ts';
import { authenticate, payCheckout } from '../payments/checkout.ts';
import { type CheckoutRecord, idOf, type IntentRecord } from '../store.ts';
import { type FieldErrors, readCardForm, readTyped, type Typed } from './card-form.ts';
import { sendPage } from './layout.ts';
import { authenticationPage, notice, paymentPage } from './payment-page.ts';

function successUrl({ session }: CheckoutRecord): string {
  return (session.success_url ?? '').replaceAll('{CHECKOUT_SESSION_ID}', session.id);
}

function sendMissing(response: Response): void {
  const body = notice('No such payment', 'This address belongs to no payment. Nothing was charged.', null);
  sendPage(response, { status: 404, title: 'No such payment', body });
}

function sendExpired(response: Response, { session }: CheckoutRecord): void {
  const link = session.cancel_url === null ? null : { href: session.cancel_url, label: 'Go back to the shop' };
  const body = notice(
    'This payment page has expired',
    'Nothing was charged. Go back and start the payment again.',
    link,
  );
  sendPage(response, { status: 410, title: 'Payment page expired', body });
}

function findCheckout(fake: Fake, request: Request): CheckoutRecord | undefined {
  return fake.store.checkouts.get(String(request.params.id));
}

function sendForm(response: Response, record: CheckoutRecord, shown: { typed: Typed; errors: FieldErrors }): void {
  const hasErrors = Object.keys(shown.errors).length > 0;
  const title = hasErrors ? 'Not paid yet: card payment' : 'Card payment';
  sendPage(response, { status: hasErrors ? 422 : 200, title, body: paymentPage(record, shown) });
}

/** Sends the payer where the payment stands: onward when paid, to the bank's question, or to the form. */
function showCheckout(fake: Fake): RequestHandler {
  return (request, response) => {
    const record = findCheckout(fake, request);
    if (!record) return sendMissing(response);
    if (record.session.status === 'complete') return response.redirect(303, successUrl(record));
    if (record.session.status === 'expired') return sendExpired(response, record);
    const intent = fake.store.intents.get(idOf(record.session.payment_intent))?.intent;
    if (intent?.status === 'requires_action') return response.redirect(303, `/authenticate/${intent.id}`);
    const { problem, payer } = record;
    const errors = problem ? { [problem.field]: problem.message } : {};
    const typed = { email: payer.email ?? '', name: payer.name ?? '' };
    sendForm(response, record, { typed, errors });
  };
}

function takeForm(fake: Fake): RequestHandler {
  return (request, response) => {
    const record = findCheckout(fake, request);
    if (!record) return sendMissing(response);
    const typed = readTyped(request.body);
    if (record.session.status === 'open') {
      const reading = readCardForm(fake, record, typed);
      if (!reading.ok) return sendForm(response, record, { typed, errors: reading.errors });
      payCheckout(fake, record, reading.form);
    }
    response.redirect(303, `/pay/${record.session.id}`);
  };
}

function leave(fake: Fake, response: Response, { intent, sessionId, returnUrl }: IntentRecord): void {
  if (sessionId !== null) return response.redirect(303, `/pay/${sessionId}`);
  if (returnUrl !== null) {
    const back = new URL(returnUrl);
    back.searchParams.set('payment_intent', intent.id);
    back.searchParams.set('payment_intent_client_secret', intent.client_secret ?? '');
    back.searchParams.set('redirect_status', intent.status === 'succeeded' ? 'succeeded' : 'failed');
    return response.redirect(303, back.href);
  }
  const isPaid = intent.status === 'succeeded';
  const body = notice(isPaid ? 'Paid' : 'Not paid', 'You can close this page.', null);
  sendPage(response, { status: 200, title: isPaid ? 'Paid' : 'Not paid', body });
}

function showAuthentication(fake: Fake): RequestHandler {
  return (request, response) => {
    const record = fake.store.intents.get(String(request.params.id));
    if (!record) return sendMissing(response);
    if (record.intent.status !== 'requires_action') return leave(fake, response, record);
    sendPage(response, { status: 200, title: 'Your bank asks', body: authenticationPage(record.intent) });
  };
}

function takeAuthentication(fake: Fake): RequestHandler {
  return (request, response) => {
    const record = fake.store.intents.get(String(request.params.id));
    if (!record) return sendMissing(response);
    const body: unknown = request.body;
    const answer = body !== null && typeof body === 'object' && 'answer' in body ? body.answer : null;
    authenticate(fake, record, answer === 'complete');
    leave(fake, response, record);
  };
}

/** The pages that the payer sees. */
export function pageRoutes(fake: Fake): Router {
  const router = express.Router();
  router.use(express.urlencoded({ extended: false, limit: '20kb' }));
  router.get('/pay/:id', showCheckout(fake));
  router.post('/pay/:id', takeForm(fake));
  router.get('/authenticate/:id', showAuthentication(fake));
  router.post('/authenticate/:id', takeAuthentication(fake));
  return router;
}
