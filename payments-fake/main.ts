import { startPaymentsFake } from './server.ts';

function required(name: string, value: string | undefined): string {
  if (value) return value;
  console.error(`The setting ${name} is missing: see README.md.`);
  process.exit(1);
}

const fake = await startPaymentsFake({
  port: Number(process.env.PAYMENTS_FAKE_PORT ?? 8090),
  secretKey: required('STRIPE_SECRET_KEY', process.env.STRIPE_SECRET_KEY),
  webhookSecret: required('STRIPE_WEBHOOK_SECRET', process.env.STRIPE_WEBHOOK_SECRET),
  webhookUrl: process.env.PAYMENTS_FAKE_WEBHOOK_URL ?? 'http://127.0.0.1:8080/api/payments/webhook',
  dir: process.env.PAYMENTS_FAKE_DIR ?? '.data/payments',
  log: (line) => console.log(line),
});
console.log(`The payments stand-in answers at ${fake.url}`);

for (const signal of ['SIGTERM', 'SIGINT'] as const) {
  process.once(signal, () => void fake.stop().then(() => process.exit(0)));
}
