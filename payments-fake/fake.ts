import type { Store } from './store.ts';
import type { Sender } from './webhooks/sender.ts';

export type WebhookMode = 'deliver' | 'hold' | 'duplicate' | 'out-of-order';

/** What /control has switched on. */
export type Settings = {
  webhooks: WebhookMode;
  /** How long a webhook waits before it is sent. */
  delayMs: number;
  /** So many payments to come are declined, whatever the card. */
  declineNext: number;
  declineRefunds: boolean;
  /** 503 to every call, or the connection dropped before anything is done. */
  down: boolean | 'drop';
  /** So many calls to come are answered with 500 and not carried out. The SDK repeats such a call. */
  failNext: number;
  /** So many calls to come are carried out and then lose their connection. */
  dropAnswers: number;
  /** How far the clock of the stand-in runs ahead of the true one. */
  aheadSeconds: number;
};

/** Everything that a request works with. */
export type Fake = {
  /** Where the browser finds the payment page. */
  url: string;
  secretKey: string;
  webhookSecret: string;
  webhookUrl: string;
  settings: Settings;
  store: Store;
  sender: Sender;
  /** Unix seconds. */
  now: () => number;
};

export function plainSettings(): Settings {
  return {
    webhooks: 'deliver',
    delayMs: 0,
    declineNext: 0,
    declineRefunds: false,
    down: false,
    failNext: 0,
    dropAnswers: 0,
    aheadSeconds: 0,
  };
}
