import http from 'node:http';
import type { AddressInfo } from 'node:net';
import path from 'node:path';
import { runOnce } from 'graphile-worker';
import Stripe from 'stripe';
import supertest from 'supertest';
import { connect } from '#db/client.ts';
import { startPaymentsFake } from '#payments-fake/server.ts';
import { createSolver } from '#server/allocation/solver/solver-pool.ts';
import { createApp } from '#server/app.ts';
import { initAuth } from '#server/auth/auth.ts';
import { sendPasswordResetMail, sendVerificationMail } from '#server/auth/auth-mails.ts';
import type { Deps } from '#server/deps.ts';
import { tellPagesTheApi } from '#server/env.ts';
import { createMailer } from '#server/mail/mailer.ts';
import { taskList } from '#server/worker.ts';
import { startTestMailFake } from './mail-fake.ts';
import { makeDatabase } from './postgres.ts';
import { makeSignIn } from './sign-in.ts';
import { testClock } from './test-clock.ts';

export type World = Awaited<ReturnType<typeof startWorld>>;

const WEBHOOK_SECRET = 'whsec_of_the_tests_only';
const INBOUND_TOKEN = 'inbound-token-of-the-tests';

/** The whole server on a port of its own, with a database, a payment company and a mail server that are this file's alone. */
export async function startWorld({ withPages = false } = {}) {
  const database = await makeDatabase();
  const { db, close } = connect(database.url, () => undefined);
  let answer: http.RequestListener = (_request, response) => response.writeHead(503).end();
  const server = http.createServer((request, response) => answer(request, response));
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const port = (server.address() as AddressInfo).port;
  const origin = `http://127.0.0.1:${port}`;
  const mail = await startTestMailFake({ url: `${origin}/api/mail/inbound`, token: INBOUND_TOKEN });
  const payments = await startPaymentsFake({
    port: 0,
    secretKey: 'sk_test_of_the_tests',
    webhookSecret: WEBHOOK_SECRET,
    webhookUrl: `${origin}/api/payments/webhook`,
  });
  const clock = testClock();
  const auth = initAuth({
    db,
    secret: 'a-secret-for-the-tests-and-nothing-else',
    origin,
    sendVerification: (letter) => sendVerificationMail(db, letter),
    sendPasswordReset: (letter) => sendPasswordResetMail(db, letter),
    isRateLimited: false,
  });
  const deps: Deps = {
    db,
    auth,
    payments: {
      stripe: new Stripe('sk_test_of_the_tests', {
        host: '127.0.0.1',
        port: payments.port,
        protocol: 'http',
        telemetry: false,
        maxNetworkRetries: 2,
      }),
      webhookSecret: WEBHOOK_SECRET,
      publishableKey: 'pk_test_of_the_tests',
      scriptUrl: `${payments.url}/stripe.js`,
    },
    mailer: createMailer(mail.smtpUrl, 'Skelderwick Farm <farm@example.com>'),
    solver: createSolver(),
    clock,
    origin,
    mailInboundToken: INBOUND_TOKEN,
    costlyPostsPerMinute: 100_000,
  };
  const app = createApp(deps, withPages ? path.join(import.meta.dirname, '../..') : null);
  if (withPages) tellPagesTheApi(port);
  answer = app.express;

  return {
    deps,
    db,
    clock,
    origin,
    mail,
    payments,
    databaseUrl: database.url,
    endpoints: app.api.endpoints,
    express: app.express,
    /** A caller without a cookie, or with one from `signIn`. */
    request: (cookie?: string) => {
      const agent = supertest.agent(origin);
      return cookie ? agent.set('Cookie', cookie) : agent;
    },
    signIn: makeSignIn(db, origin),
    /** Runs every job that is due, as the worker would; of the kinds named only, where others would take minutes. */
    runJobs: (kinds?: readonly string[]) => {
      const tasks = Object.entries(taskList(deps)).filter(([kind]) => kinds?.includes(kind) ?? true);
      return runOnce({
        connectionString: database.url,
        taskList: Object.fromEntries(tasks),
        noHandleSignals: true,
      });
    },
    stop: async () => {
      await new Promise((resolve) => {
        server.close(resolve);
        server.closeAllConnections();
      });
      await payments.stop();
      await deps.solver.stop();
      deps.mailer.close();
      await mail.stop();
      await close();
      await database.drop();
    },
  };
}
