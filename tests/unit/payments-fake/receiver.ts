import http from 'node:http';
import type { AddressInfo } from 'node:net';
import Stripe from 'stripe';
import { type PaymentsFake, type PaymentsFakeOptions, startPaymentsFake } from '#payments-fake/server.ts';

const WEBHOOK_SECRET = 'whsec_of_these_tests';
export const SECRET_KEY = 'sk_test_of_these_tests';

export type Received = { body: string; signature: string };

/** A webhook address that answers as it is told and keeps what it got. */
async function startReceiver() {
  const received: Received[] = [];
  const answers: number[] = [];
  const waiting: (() => void)[] = [];
  const server = http.createServer((request, response) => {
    const parts: Buffer[] = [];
    request.on('data', (part: Buffer) => parts.push(part));
    request.on('end', () => {
      received.push({
        body: Buffer.concat(parts).toString(),
        signature: String(request.headers['stripe-signature']),
      });
      response.writeHead(answers.shift() ?? 200).end();
      for (const look of waiting.splice(0)) look();
    });
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const { port } = server.address() as AddressInfo;
  return {
    url: `http://127.0.0.1:${port}/hook`,
    received,
    /** The statuses of the next answers, before it answers 200 again. */
    answerWith: (...statuses: number[]) => answers.push(...statuses),
    /** Resolves once so many have come. */
    async waitFor(count: number): Promise<void> {
      while (received.length < count) await new Promise<void>((resolve) => waiting.push(resolve));
    },
    stop: () =>
      new Promise((resolve) => {
        server.close(resolve);
        server.closeAllConnections();
      }),
  };
}

export type Company = Awaited<ReturnType<typeof startCompany>>;

/** The stand-in, an address for its webhooks and the real SDK pointed at it. */
export async function startCompany(more: Partial<PaymentsFakeOptions> = {}) {
  const receiver = await startReceiver();
  const options = {
    port: 0,
    secretKey: SECRET_KEY,
    webhookSecret: WEBHOOK_SECRET,
    webhookUrl: receiver.url,
    retryMs: 10,
  };
  const fake: PaymentsFake = await startPaymentsFake({ ...options, ...more });
  const stripe = sdkFor(fake.port);
  return {
    fake,
    stripe,
    receiver,
    /** Checks the signature with the SDK and gives the event. */
    verify: ({ body, signature }: Received): Stripe.Event =>
      stripe.webhooks.constructEvent(body, signature, WEBHOOK_SECRET),
    typesReceived: () => receiver.received.map(({ body }) => (JSON.parse(body) as Stripe.EventBase).type),
    stop: async () => {
      await fake.stop();
      await receiver.stop();
    },
  };
}

export function sdkFor(port: number, key = SECRET_KEY): Stripe {
  return new Stripe(key, { host: '127.0.0.1', port, protocol: 'http', telemetry: false, maxNetworkRetries: 2 });
}

/** A session over one pack, open for 31 minutes. */
export async function openSession(stripe: Stripe, more: Partial<Stripe.Checkout.SessionCreateParams> = {}) {
  const session = await stripe.checkout.sessions.create({
    mode: 'payment',
    line_items: [
      {
        quantity: 2,
        price_data: { currency: 'gbp', unit_amount: 1250, product_data: { name: 'Braising steak' } },
      },
    ],
    customer_email: 'payer@example.com',
    client_reference_id: 'order-1',
    metadata: { orderNo: '1041' },
    payment_intent_data: { metadata: { orderNo: '1041' } },
    expires_at: Math.floor(Date.now() / 1000) + 31 * 60,
    success_url: 'http://127.0.0.1:8080/orders/thanks?session={CHECKOUT_SESSION_ID}',
    cancel_url: 'http://127.0.0.1:8080/basket',
    ...more,
  });
  if (session.url === null) throw new Error('An open session has an address');
  return { ...session, url: session.url };
}

/** The error that a call ends with. */
export async function errorOf(call: Promise<unknown>): Promise<Stripe.errors.StripeError> {
  try {
    await call;
  } catch (error) {
    if (error instanceof Stripe.errors.StripeError) return error;
    throw error;
  }
  throw new Error('The call was not refused');
}
