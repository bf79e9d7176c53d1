import Stripe from 'stripe';
import { connect } from '#db/client.ts';
import { startPaymentsFake } from '#payments-fake/server.ts';
import { createSolver } from '#server/allocation/solver/solver-pool.ts';
import { initAuth } from '#server/auth/auth.ts';
import { sendPasswordResetMail, sendVerificationMail } from '#server/auth/auth-mails.ts';
import { systemClock } from '#server/clock.ts';
import type { Deps } from '#server/deps.ts';
import { readEnv } from '#server/env.ts';
import { createMailer } from '#server/mail/mailer.ts';
import { emptyDatabase, readDemoState } from './demo/demo-state.ts';
import { seedDemoFarm } from './demo/seed-demo-farm.ts';

const env = readEnv();
const { db, close } = connect(env.DATABASE_URL, (error) => console.error(error.message));

// The stand-in of the payment company takes the money of the seeded orders, so that they can be refunded like any other.
const payments = await startPaymentsFake({
  port: 0,
  secretKey: env.STRIPE_SECRET_KEY,
  webhookSecret: env.STRIPE_WEBHOOK_SECRET,
  webhookUrl: `${env.PUBLIC_ORIGIN}/api/payments/webhook`,
  dir: process.env.PAYMENTS_FAKE_DIR ?? '.data/payments',
});
payments.control({ webhooks: 'hold' });

const deps: Deps = {
  db,
  auth: initAuth({
    db,
    secret: env.BETTER_AUTH_SECRET,
    origin: env.PUBLIC_ORIGIN,
    sendVerification: (mail) => sendVerificationMail(db, mail),
    sendPasswordReset: (mail) => sendPasswordResetMail(db, mail),
    isRateLimited: true,
  }),
  payments: {
    stripe: new Stripe(env.STRIPE_SECRET_KEY, {
      host: '127.0.0.1',
      port: payments.port,
      protocol: 'http',
      telemetry: false,
    }),
    webhookSecret: env.STRIPE_WEBHOOK_SECRET,
    publishableKey: env.STRIPE_PUBLISHABLE_KEY,
    scriptUrl: env.STRIPE_JS_URL,
  },
  mailer: createMailer(env.SMTP_URL, env.MAIL_FROM),
  solver: createSolver(),
  clock: systemClock,
  origin: env.PUBLIC_ORIGIN.replace(/\/$/, ''),
  mailInboundToken: env.MAIL_INBOUND_TOKEN,
  costlyPostsPerMinute: env.COSTLY_POSTS_PER_MINUTE,
};

try {
  const state = await readDemoState(db, deps.clock.today());
  if (state === 'stale and used') {
    console.log(
      'The next cutting day of the demo has passed. What you did is kept; npm run reset makes the farm afresh.',
    );
  }
  if (state === 'stale and untouched') await emptyDatabase(db);
  if (state === 'empty' || state === 'stale and untouched') await seedDemoFarm(deps);
} finally {
  await payments.stop();
  await deps.solver.stop();
  deps.mailer.close();
  await close();
}
