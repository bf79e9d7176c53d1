import type { Store } from './store.ts';
import type { Sender } from './webhooks/sender.ts';

export type WebhookMode = 'deliver' | 'hold' | 'duplicate' | 'out-of-order';

/** What /control has switched on. */
export type Settings = {
  webhooks: WebhookMode;
  delayMs: number;
  declineRefunds: boolean;
  down: boolean | 'drop';
  dropAnswers: number;
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

export const plainSettings: Settings = {
  webhooks: 'deliver',
  delayMs: 0,
  declineRefunds: false,
  down: false,
  dropAnswers: 0,
};
