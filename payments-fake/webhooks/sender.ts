import { newId } from '../ids.ts';
import type { Settings } from '../fake.ts';
import type { Delivery, Store } from '../store.ts';
import { signWebhook } from './signature.ts';

const mostAttempts = 10;
const longestWaitSteps = 15;
const gatherMs = 250;
const answerTimeoutMs = 10_000;

export type Sender = {
  enqueue: (eventId: string) => void;
  /** Looks again at what is due, after a setting changed. */
  wake: () => void;
  /** Sends everything that is not delivered yet, held or given up included, and waits for the answers. */
  flush: () => Promise<{ delivered: number; failed: number }>;
  stop: () => Promise<void>;
};

export type SenderOptions = {
  store: Store;
  settings: Settings;
  webhookUrl: string;
  webhookSecret: string;
  /** The wait after the first failure; it doubles each time. */
  retryMs: number;
  log: (line: string) => void;
};

/** Sends one event. True when the receiver answered with 2xx. */
async function post(options: SenderOptions, delivery: Delivery, stop: AbortSignal): Promise<boolean> {
  const event = options.store.events.get(delivery.eventId);
  if (!event) throw new Error(`The delivery ${delivery.id} has lost its event ${delivery.eventId}`);
  const body = JSON.stringify(event);
  try {
    const response = await fetch(options.webhookUrl, {
      method: 'POST',
      redirect: 'manual',
      headers: {
        'content-type': 'application/json; charset=utf-8',
        'stripe-signature': signWebhook(body, options.webhookSecret),
      },
      body,
      signal: AbortSignal.any([stop, AbortSignal.timeout(answerTimeoutMs)]),
    });
    await response.arrayBuffer();
    if (!response.ok) options.log(`${event.type} ${event.id}: the receiver answered ${response.status}`);
    return response.ok;
  } catch (error) {
    if (!stop.aborted)
      options.log(`${event.type} ${event.id}: ${error instanceof Error ? error.message : 'no answer'}`);
    return false;
  }
}

function fail(delivery: Delivery, retryMs: number): void {
  delivery.attempts += 1;
  delivery.isGivenUp = delivery.attempts >= mostAttempts;
  delivery.dueAt = Date.now() + retryMs * Math.min(2 ** (delivery.attempts - 1), longestWaitSteps);
}

function waitingIn({ store, settings }: SenderOptions): Delivery[] {
  const waiting = [...store.deliveries.values()];
  return settings.webhooks === 'out-of-order' ? waiting.reverse() : waiting;
}

/** One delivery at a time, so that 'deliver' keeps the order in which things happened. */
export function createSender(options: SenderOptions): Sender {
  const { store, settings } = options;
  const stopping = new AbortController();
  let timer: ReturnType<typeof setTimeout> | undefined;
  let work: Promise<unknown> = Promise.resolve();

  // What an earlier run did not deliver starts afresh.
  for (const left of store.deliveries.values())
    Object.assign(left, { attempts: 0, dueAt: Date.now(), isGivenUp: false });

  async function attempt(delivery: Delivery): Promise<boolean> {
    const isDelivered = await post(options, delivery, stopping.signal);
    if (stopping.signal.aborted) return false;
    if (isDelivered) store.deliveries.delete(delivery.id);
    else fail(delivery, options.retryMs);
    store.changed();
    return isDelivered;
  }

  async function sendDue(): Promise<void> {
    while (!stopping.signal.aborted && settings.webhooks !== 'hold') {
      const due = waitingIn(options).find((delivery) => !delivery.isGivenUp && delivery.dueAt <= Date.now());
      if (!due) break;
      await attempt(due);
    }
    wake();
  }

  function wake(): void {
    clearTimeout(timer);
    if (stopping.signal.aborted || settings.webhooks === 'hold') return;
    const times = waitingIn(options).flatMap((delivery) => (delivery.isGivenUp ? [] : [delivery.dueAt]));
    if (times.length === 0) return;
    timer = setTimeout(() => (work = work.then(sendDue)), Math.max(0, Math.min(...times) - Date.now()));
  }

  function enqueue(eventId: string): void {
    const isShuffled = settings.webhooks === 'out-of-order';
    const dueAt = Date.now() + settings.delayMs + (isShuffled ? gatherMs : 0);
    for (let copies = settings.webhooks === 'duplicate' ? 2 : 1; copies > 0; copies -= 1) {
      const delivery = { id: newId('we'), eventId, attempts: 0, dueAt, isGivenUp: false };
      store.deliveries.set(delivery.id, delivery);
    }
    // The newest goes first, so the ones before it wait for it.
    if (isShuffled) for (const earlier of store.deliveries.values()) if (earlier.attempts === 0) earlier.dueAt = dueAt;
    store.changed();
    wake();
  }

  async function flush(): Promise<{ delivered: number; failed: number }> {
    const round = work.then(async () => {
      const waiting = waitingIn(options);
      let delivered = 0;
      for (const delivery of waiting) if (await attempt(delivery)) delivered += 1;
      return { delivered, failed: waiting.length - delivered };
    });
    work = round;
    const result = await round;
    wake();
    return result;
  }

  async function stop(): Promise<void> {
    stopping.abort();
    clearTimeout(timer);
    await work;
  }

  return { enqueue, wake, flush, stop };
}
