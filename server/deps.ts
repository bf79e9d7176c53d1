import type Stripe from 'stripe';
import type { Db, Tx } from '#db/client.ts';
import type { Day } from '#shared/domain/day.ts';
import type { Auth } from './auth/auth.ts';
import type { Solver } from './allocation/solver/solver-pool.ts';
import type { Mailer } from './mail/mailer.ts';

export type { Db, Tx };

export type Clock = { now: () => Date; today: () => Day };

export type Payments = {
  stripe: Stripe;
  webhookSecret: string;
  /** Names the account to the payer's browser. */
  publishableKey: string;
  /** Where the payer's browser gets the payment company's own script. */
  scriptUrl: string;
};

/** All that the server's code reaches outside itself with. Made in main.ts, or by the tests with stand-ins. */
export type Deps = {
  db: Db;
  auth: Auth;
  payments: Payments;
  mailer: Mailer;
  solver: Solver;
  clock: Clock;
  /** The address that people type, without a slash at the end. */
  origin: string;
  mailInboundToken: string;
  /** Posts a minute from one address that hold stock or cost something. */
  costlyPostsPerMinute: number;
};
