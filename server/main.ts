import path from 'node:path';
import Stripe from 'stripe';
import { connect } from '#db/client.ts';
import { createSolver } from './allocation/solver/solver-pool.ts';
import { createApp } from './app.ts';
import { initAuth } from './auth/auth.ts';
import { sendPasswordResetMail, sendVerificationMail } from './auth/auth-mails.ts';
import { systemClock } from './clock.ts';
import type { Deps } from './deps.ts';
import { readEnv, tellPagesTheApi } from './env.ts';
import { log } from './http/log.ts';
import { startWorker } from './worker.ts';
import { createMailer } from './mail/mailer.ts';

const env = readEnv();
const { db, close } = connect(env.DATABASE_URL, (error) => log.error({ err: error }, 'database connection lost'));
const origin = env.PUBLIC_ORIGIN.replace(/\/$/, '');

const deps: Deps = {
  db,
  auth: initAuth({
    db,
    secret: env.BETTER_AUTH_SECRET,
    origin,
    sendVerification: (mail) => sendVerificationMail(db, mail),
    sendPasswordReset: (mail) => sendPasswordResetMail(db, mail),
    isRateLimited: true,
  }),
  payments: {
    stripe: new Stripe(env.STRIPE_SECRET_KEY, {
      ...(env.STRIPE_API_HOST ? { host: env.STRIPE_API_HOST } : {}),
      ...(env.STRIPE_API_PORT ? { port: env.STRIPE_API_PORT } : {}),
      ...(env.STRIPE_API_PROTOCOL ? { protocol: env.STRIPE_API_PROTOCOL } : {}),
      telemetry: false,
      maxNetworkRetries: 2,
    }),
    webhookSecret: env.STRIPE_WEBHOOK_SECRET,
    publishableKey: env.STRIPE_PUBLISHABLE_KEY,
    scriptUrl: env.STRIPE_JS_URL,
  },
  mailer: createMailer(env.SMTP_URL, env.MAIL_FROM),
  solver: createSolver(),
  clock: systemClock,
  origin,
  mailInboundToken: env.MAIL_INBOUND_TOKEN,
  costlyPostsPerMinute: env.COSTLY_POSTS_PER_MINUTE,
};

tellPagesTheApi(env.PORT);
void deps.solver.warm();
const worker = await startWorker(deps, env.DATABASE_URL);
const app = createApp(deps, path.join(import.meta.dirname, '..'));
const server = app.express.listen(env.PORT, '127.0.0.1', () => {
  log.info({ port: env.PORT }, 'listening');
  // The first visitor should not wait for the pages to be loaded and drawn once.
  void fetch(`http://127.0.0.1:${env.PORT}/`).catch((error: unknown) => log.warn({ err: error }, 'pages not warmed'));
});
server.on('error', (error) => {
  log.fatal({ err: error }, 'cannot listen');
  process.exit(1);
});

async function stop(): Promise<void> {
  const closed = new Promise((resolve) => server.close(resolve));
  server.closeIdleConnections();
  const hurry = setTimeout(() => server.closeAllConnections(), 5_000);
  await closed;
  clearTimeout(hurry);
  await worker.stop();
  await deps.solver.stop();
  deps.mailer.close();
  await close();
}

for (const signal of ['SIGTERM', 'SIGINT'] as const) {
  process.once(signal, () => void stop().then(() => process.exit(0)));
}
