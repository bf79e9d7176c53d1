import type { Server } from 'node:http';
import express from 'express';
import type Stripe from 'stripe';
import { apiRoutes } from './api/routes.ts';
import { applySettings, catchUp, controlRoutes, expireNow, resetSettings } from './control/control-routes.ts';
import { type Fake, plainSettings, type Settings } from './fake.ts';
import { pageRoutes } from './page/page-routes.ts';
import { stripeJsRoutes } from './page/stripe-js-routes.ts';
import { openStore } from './store.ts';
import { createSender } from './webhooks/sender.ts';

export type PaymentsFakeOptions = {
  /** 0 takes a free port. */
  port: number;
  secretKey: string;
  webhookSecret: string;
  webhookUrl: string;
  /** Where the state is kept over a restart. Without it everything stays in memory. */
  dir?: string;
  /** The wait after the first webhook that the receiver did not take; it doubles each time. */
  retryMs?: number;
  log?: (line: string) => void;
};

export type PaymentsFake = {
  port: number;
  url: string;
  /** Changes the settings that are named; the others stay. */
  control: (change: Partial<Settings>) => void;
  /** Every setting back to plain; what was held goes out. */
  reset: () => void;
  /** Sends every webhook that is waiting or held, and waits for the answers. */
  flush: () => Promise<{ delivered: number; failed: number }>;
  /** Ends an open session as time would. */
  expire: (sessionId: string) => void;
  /** Lets the clock of the stand-in run ahead by this much more. */
  advance: (step: { minutes: number }) => void;
  /** Oldest first. */
  events: () => Stripe.EventBase[];
  refunds: () => Stripe.Refund[];
  charges: () => Stripe.Charge[];
  stop: () => Promise<void>;
};

const lookEveryMs = 1000;
const usualRetryMs = 2000;

function createWeb(fake: Fake): express.Express {
  const app = express();
  app.disable('x-powered-by');
  app.set('query parser', 'extended');
  app.get('/health', (_request, response) => {
    response.json({ ok: true });
  });
  app.use((_request, _response, next) => {
    catchUp(fake);
    next();
  });
  app.use('/v1', apiRoutes(fake));
  app.use('/control', controlRoutes(fake));
  app.use(stripeJsRoutes(fake));
  app.use(pageRoutes(fake));
  return app;
}

async function listen(app: express.Express, port: number): Promise<Server> {
  return new Promise((resolve, reject) => {
    const server = app.listen(port, '127.0.0.1', (error) => (error ? reject(error) : resolve(server)));
  });
}

function portOf(server: Server): number {
  const address = server.address();
  if (address === null || typeof address === 'string') throw new Error('The server has no port');
  return address.port;
}

function createFake(options: PaymentsFakeOptions): Fake {
  const { secretKey, webhookSecret, webhookUrl, retryMs = usualRetryMs, log = () => undefined } = options;
  const store = openStore(options.dir);
  const settings = plainSettings();
  const sender = createSender({ store, settings, webhookUrl, webhookSecret, retryMs, log });
  const now = () => Math.floor(Date.now() / 1000) + settings.aheadSeconds;
  return { url: '', secretKey, webhookSecret, webhookUrl, settings, store, sender, now };
}

async function close(server: Server): Promise<void> {
  const closed = new Promise<void>((resolve) => server.close(() => resolve()));
  server.closeAllConnections();
  await closed;
}

/** Starts the stand-in for the payment company on 127.0.0.1. */
export async function startPaymentsFake(options: PaymentsFakeOptions): Promise<PaymentsFake> {
  const fake = createFake(options);
  const server = await listen(createWeb(fake), options.port);
  const port = portOf(server);
  fake.url = `http://127.0.0.1:${port}`;
  const clockwork = setInterval(() => catchUp(fake), lookEveryMs);
  catchUp(fake);
  fake.sender.wake();
  return {
    port,
    url: fake.url,
    control: (change) => applySettings(fake, change),
    reset: () => resetSettings(fake),
    flush: () => fake.sender.flush(),
    expire: (sessionId) => expireNow(fake, sessionId),
    advance: ({ minutes }) => applySettings(fake, { aheadSeconds: fake.settings.aheadSeconds + minutes * 60 }),
    events: () => [...fake.store.events.values()],
    refunds: () => [...fake.store.refunds.values()].map((record) => record.refund),
    charges: () => [...fake.store.charges.values()],
    stop: async () => {
      clearInterval(clockwork);
      await close(server);
      await fake.sender.stop();
      fake.store.writeNow();
    },
  };
}
