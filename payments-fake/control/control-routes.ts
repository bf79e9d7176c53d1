import express, { type Router } from 'express';
import { plainSettings, type Fake, type Settings, type WebhookMode } from '../fake.ts';
import { expireCheckout, expireDueCheckouts } from '../payments/checkout.ts';
import { settleDueRefunds } from '../payments/refund.ts';

const modes: WebhookMode[] = ['deliver', 'hold', 'duplicate', 'out-of-order'];
const counts = ['delayMs', 'declineNext', 'failNext', 'dropAnswers', 'aheadSeconds'] as const;

/** What time has brought about since it was last looked at. */
export function catchUp(fake: Fake): void {
  expireDueCheckouts(fake);
  settleDueRefunds(fake);
}

export function applySettings(fake: Fake, change: Partial<Settings>): void {
  Object.assign(fake.settings, change);
  catchUp(fake);
  fake.sender.wake();
}

/** Every setting as the plain ones are; held webhooks go out. */
export function resetSettings(fake: Fake): void {
  applySettings(fake, plainSettings());
}

export function expireNow(fake: Fake, sessionId: string): void {
  const record = fake.store.checkouts.get(sessionId);
  if (record?.session.status !== 'open') throw new Error(`There is no open session ${sessionId}`);
  expireCheckout(fake, record);
}

/** The settings named in the body, or a sentence on the first that is wrong. */
function readChange(body: unknown): Partial<Settings> | string {
  const given = new Map<string, unknown>(body !== null && typeof body === 'object' ? Object.entries(body) : []);
  const change: Partial<Settings> = {};
  for (const [name, value] of given) {
    const count = counts.find((known) => known === name);
    const mode = modes.find((known) => known === value);
    if (count && typeof value === 'number' && Number.isInteger(value) && value >= 0) change[count] = value;
    else if (name === 'webhooks' && mode) change.webhooks = mode;
    else if (name === 'declineRefunds' && typeof value === 'boolean') change.declineRefunds = value;
    else if (name === 'down' && (typeof value === 'boolean' || value === 'drop')) change.down = value;
    else return `The setting ${name} is not known, or cannot have this value.`;
  }
  return change;
}

/** The same for a person at a terminal: see README.md. */
export function controlRoutes(fake: Fake): Router {
  const router = express.Router();
  router.use(express.json());
  router.get('/', (_request, response) => {
    response.json({ settings: fake.settings, waiting: [...fake.store.deliveries.values()] });
  });
  router.post('/', (request, response) => {
    const change = request.is('json') ? readChange(request.body) : 'Send the settings as JSON.';
    if (typeof change === 'string') {
      response.status(400).json({ error: change });
      return;
    }
    applySettings(fake, change);
    response.json({ settings: fake.settings });
  });
  router.post('/reset', (_request, response) => {
    resetSettings(fake);
    response.json({ settings: fake.settings });
  });
  router.post('/flush', async (_request, response) => {
    response.json(await fake.sender.flush());
  });
  router.post('/expire/:id', (request, response) => {
    if (fake.store.checkouts.get(request.params.id)?.session.status !== 'open') {
      response.status(404).json({ error: 'There is no such open session.' });
      return;
    }
    expireNow(fake, request.params.id);
    response.json({ expired: request.params.id });
  });
  return router;
}
