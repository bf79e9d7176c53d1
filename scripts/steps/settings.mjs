import { randomBytes } from 'node:crypto';
import { chmodSync, existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { Refusal } from './say.mjs';

export const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '../..');
export const dataDir = path.join(root, '.data');
export const logDir = path.join(dataDir, 'logs');

export function requireNode() {
  const [major, minor] = process.versions.node.split('.').map(Number);
  if (major === 20 && minor >= 19) return;
  throw new Refusal(`Node ${process.versions.node} is running, but Node 20 (20.19 or later) is needed.`);
}

function port(variable, usual) {
  const value = Number(process.env[variable] ?? usual);
  if (Number.isInteger(value) && value > 0 && value < 65_536) return value;
  throw new Refusal(`${variable}=${process.env[variable]} is not a port: give a number from 1 to 65535.`);
}

/** The ports of the demo, each overridden by the variable of the same name. */
export function readPorts() {
  return {
    PORT: port('PORT', 8080),
    PAYMENTS_FAKE_PORT: port('PAYMENTS_FAKE_PORT', 8090),
    MAIL_FAKE_SMTP_PORT: port('MAIL_FAKE_SMTP_PORT', 8025),
    MAIL_FAKE_HTTP_PORT: port('MAIL_FAKE_HTTP_PORT', 8026),
    PG_PORT: port('PG_PORT', 54329),
  };
}

/** The demo's secrets, made once per checkout and kept in .data/local.env, which only its owner reads. */
export function readSecrets() {
  const file = path.join(dataDir, 'local.env');
  if (!existsSync(file)) {
    const secret = () => randomBytes(32).toString('hex');
    mkdirSync(dataDir, { recursive: true });
    const lines = [
      `BETTER_AUTH_SECRET=${secret()}`,
      `STRIPE_SECRET_KEY=sk_test_${secret()}`,
      `STRIPE_WEBHOOK_SECRET=whsec_${secret()}`,
      `MAIL_INBOUND_TOKEN=${secret()}`,
    ];
    writeFileSync(file, `${lines.join('\n')}\n`, { mode: 0o600 });
    chmodSync(file, 0o600);
  }
  const pairs = readFileSync(file, 'utf8').matchAll(/^([A-Z_]+)=(.*)$/gm);
  return Object.fromEntries([...pairs].map(([, name, value]) => [name, value]));
}

/**
 * Everything that the demo's processes read. It goes over what the shell holds, so that a real key or database address
 * lying there is never used by the demo.
 */
export function demoEnvironment({ ports, databaseUrl, origin = `http://localhost:${ports.PORT}` }) {
  const api = `http://127.0.0.1:${ports.PORT}`;
  return {
    ...process.env,
    ...readSecrets(),
    ...Object.fromEntries(Object.entries(ports).map(([name, value]) => [name, String(value)])),
    NODE_ENV: 'production',
    PUBLIC_ORIGIN: origin,
    DATABASE_URL: databaseUrl,
    STRIPE_API_HOST: '127.0.0.1',
    STRIPE_API_PORT: String(ports.PAYMENTS_FAKE_PORT),
    STRIPE_API_PROTOCOL: 'http',
    STRIPE_PUBLISHABLE_KEY: 'pk_test_of_the_demo',
    STRIPE_JS_URL: `http://127.0.0.1:${ports.PAYMENTS_FAKE_PORT}/stripe.js`,
    SMTP_URL: `smtp://127.0.0.1:${ports.MAIL_FAKE_SMTP_PORT}`,
    MAIL_FROM: 'Skelderwick Farm <orders@skelderwick.example.com>',
    MAIL_INBOUND_URL: `${api}/api/mail/inbound`,
    MAIL_FAKE_DIR: path.join(dataDir, 'mail'),
    PAYMENTS_FAKE_WEBHOOK_URL: `${api}/api/payments/webhook`,
    PAYMENTS_FAKE_DIR: path.join(dataDir, 'payments'),
  };
}
