import { startMailFake } from './server.ts';

const fake = await startMailFake({
  smtpPort: Number(process.env.MAIL_FAKE_SMTP_PORT ?? 8025),
  httpPort: Number(process.env.MAIL_FAKE_HTTP_PORT ?? 8026),
  dir: process.env.MAIL_FAKE_DIR ?? '.data/mail',
  inboundUrl: process.env.MAIL_INBOUND_URL ?? 'http://127.0.0.1:8080/api/mail/inbound',
  inboundToken: process.env.MAIL_INBOUND_TOKEN ?? '',
});
console.log(`Mail to 127.0.0.1:${fake.smtpPort}, mailbox page at http://127.0.0.1:${fake.httpPort}`);

for (const signal of ['SIGTERM', 'SIGINT'] as const) {
  process.once(signal, () => void fake.stop().then(() => process.exit(0)));
}
