import { mkdtemp, rm } from 'node:fs/promises';
import http from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import path from 'node:path';
import nodemailer from 'nodemailer';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { type MailFake, startMailFake } from '#scripts/mail-fake/server.ts';

type Received = { type: string | undefined; authorization: string | undefined; body: Buffer };

let dir: string;
let fake: MailFake;
let shop: http.Server;
let received: Received[];
let shopAnswers: number;

beforeEach(async () => {
  received = [];
  shopAnswers = 204;
  shop = http.createServer((request, response) => {
    const parts: Buffer[] = [];
    request.on('data', (part: Buffer) => parts.push(part));
    request.on('end', () => {
      const { 'content-type': type, authorization } = request.headers;
      received.push({ type, authorization, body: Buffer.concat(parts) });
      response.writeHead(shopAnswers).end();
    });
  });
  await new Promise<void>((resolve) => shop.listen(0, '127.0.0.1', resolve));
  const { port } = shop.address() as AddressInfo;
  dir = await mkdtemp(path.join(tmpdir(), 'mail-fake-test-'));
  fake = await startMailFake({
    smtpPort: 0,
    httpPort: 0,
    dir,
    inboundUrl: `http://127.0.0.1:${port}/in`,
    inboundToken: 'a-token',
  });
  const transport = nodemailer.createTransport({ host: '127.0.0.1', port: fake.smtpPort });
  await transport.sendMail({ from: 'farm@example.com', to: 'ann@example.com', subject: 'Your box', text: 'Ready' });
});

afterEach(async () => {
  await fake.stop();
  shop.closeAllConnections();
  await new Promise((resolve) => shop.close(resolve));
  await rm(dir, { recursive: true, force: true });
});

const bounce = () =>
  fetch(`http://127.0.0.1:${fake.httpPort}/api/messages/${fake.messages()[0]?.id}/bounce`, { method: 'POST' });

test('bouncing a mail, when the shop listens, posts a delivery-status mail with its bearer token', async () => {
  const answer = await bounce();
  expect(answer.status).toBe(200);
  expect(await answer.json()).toEqual({ bounced: ['ann@example.com'] });
  expect(received).toHaveLength(1);
  expect(received[0]).toMatchObject({ type: 'message/rfc822', authorization: 'Bearer a-token' });
});

test('a delivery-status mail names the recipient, the failure and the Message-ID of the mail', async () => {
  await bounce();
  const raw = received[0]?.body.toString('latin1') ?? '';
  const boundary = /^Content-Type: multipart\/report; report-type=delivery-status; boundary="(.+)"\r$/m.exec(raw)?.[1];
  const parts = raw.split(`--${boundary}`);
  const part = (type: string) => {
    const found = parts.find((one) => one.startsWith(`\r\nContent-Type: ${type}\r\n\r\n`));
    return found?.slice(found.indexOf('\r\n\r\n')) ?? '';
  };
  const [perMessage, perRecipient] = part('message/delivery-status')
    .trim()
    .split(/\r?\n\r?\n/);
  expect(perMessage).toMatch(/^Reporting-MTA: dns;/m);
  expect(perRecipient).toMatch(/^Original-Recipient: rfc822;ann@example\.com\r?$/m);
  expect(perRecipient).toMatch(/^Final-Recipient: rfc822;ann@example\.com\r?$/m);
  expect(perRecipient).toMatch(/^Action: failed\r?$/m);
  expect(perRecipient).toMatch(/^Status: 5\.1\.1\r?$/m);
  const messageId = fake.messages()[0]?.messageId ?? 'none';
  expect(part('text/rfc822-headers')).toContain(`Message-ID: ${messageId}`);
  expect(part('text/rfc822-headers')).not.toContain('Ready');
});

test('bouncing a mail, when the shop refuses the report, says so with 502', async () => {
  shopAnswers = 401;
  const answer = await bounce();
  expect(answer.status).toBe(502);
  expect(JSON.stringify(await answer.json())).toContain('401');
});
