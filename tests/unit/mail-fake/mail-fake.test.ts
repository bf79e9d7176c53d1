import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import nodemailer, { type SendMailOptions } from 'nodemailer';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { type MailFake, startMailFake } from '#scripts/mail-fake/server.ts';

let dir: string;
let fake: MailFake;

beforeEach(async () => {
  dir = await mkdtemp(path.join(tmpdir(), 'mail-fake-test-'));
  fake = await startMailFake({ smtpPort: 0, httpPort: 0, dir });
});

afterEach(async () => {
  await fake.stop();
  await rm(dir, { recursive: true, force: true });
});

function send(mail: SendMailOptions) {
  const transport = nodemailer.createTransport({ host: '127.0.0.1', port: fake.smtpPort });
  return transport.sendMail({ from: 'farm@example.com', subject: 'Your box', text: 'Ready on Friday', ...mail });
}

const fetchPage = (where: string, options?: RequestInit) => fetch(`http://127.0.0.1:${fake.httpPort}${where}`, options);

function control(body: unknown) {
  return fetchPage('/control', {
    method: 'POST',
    headers: { 'content-type': 'application/json' },
    body: JSON.stringify(body),
  });
}

describe('receiving', () => {
  test('a mail with text, HTML and a calendar file, when sent over SMTP, is kept in all its parts', async () => {
    await send({
      to: 'Ann <ann@example.com>',
      text: '£64 for 5 kg',
      html: '<p>£64 for <b>5 kg</b></p>',
      attachments: [
        { filename: 'collection.ics', content: 'BEGIN:VCALENDAR\r\nEND:VCALENDAR', contentType: 'text/calendar' },
      ],
    });
    const mail = fake.lastMailTo('ANN@example.com');
    expect(mail).toMatchObject({ from: 'farm@example.com', to: ['ann@example.com'], subject: 'Your box' });
    expect(mail?.text).toContain('£64 for 5 kg');
    expect(mail?.html).toContain('£64 for <b>5 kg</b>');
    expect(mail?.messageId).toMatch(/^<.+@.+>$/);
    const [file] = mail?.attachments ?? [];
    expect(file).toMatchObject({ filename: 'collection.ics', contentType: 'text/calendar' });
    expect(Buffer.from(file?.contentBase64 ?? '', 'base64').toString()).toContain('BEGIN:VCALENDAR');
  });

  test('a blind copy, which no header names, is in the mailbox of its recipient', async () => {
    await send({ to: 'ann@example.com', bcc: 'office@example.com' });
    expect(fake.lastMailTo('office@example.com')?.subject).toBe('Your box');
  });

  test('waiting for a mail, when the wanted one comes second, answers with that one', async () => {
    const wanted = fake.waitForMail('ann@example.com', (mail) => mail.subject === 'Second');
    await send({ to: 'ann@example.com', subject: 'First' });
    await send({ to: 'ann@example.com', subject: 'Second' });
    expect((await wanted).subject).toBe('Second');
  });

  test('mails, when the fake is started again on the same folder, are still there in their order', async () => {
    await send({ to: 'ann@example.com', subject: 'First' });
    await send({ to: 'ann@example.com', subject: 'Second' });
    await fake.stop();
    fake = await startMailFake({ smtpPort: 0, httpPort: 0, dir });
    expect(fake.messages().map((mail) => mail.subject)).toEqual(['First', 'Second']);
  });
});

describe('control', () => {
  test('sending, when the server is down, fails for now with 421 and works again when it is up', async () => {
    expect((await control({ smtp: 'down' })).status).toBe(204);
    await expect(send({ to: 'ann@example.com' })).rejects.toMatchObject({ responseCode: 421 });
    expect(fake.messages()).toEqual([]);
    await control({ smtp: 'up' });
    await send({ to: 'ann@example.com' });
    expect(fake.messages()).toHaveLength(1);
  });

  test('sending over a kept connection, when the server has gone down since, fails with 421', async () => {
    const pool = nodemailer.createTransport({ host: '127.0.0.1', port: fake.smtpPort, pool: true, maxConnections: 1 });
    const mail = { from: 'farm@example.com', to: 'ann@example.com', text: 'x' };
    await pool.sendMail(mail);
    fake.control({ smtp: 'down' });
    await expect(pool.sendMail(mail)).rejects.toMatchObject({ responseCode: 421 });
    pool.close();
  });

  test('a refused recipient gets a permanent 550 while others are served', async () => {
    await control({ smtp: 'refuse', address: 'gone@example.com' });
    await expect(send({ to: 'Gone@example.com' })).rejects.toMatchObject({ responseCode: 550 });
    await send({ to: 'ann@example.com' });
    expect(fake.messages().map((mail) => mail.to)).toEqual([['ann@example.com']]);
    await control({ smtp: 'up', address: 'gone@example.com' });
    await send({ to: 'gone@example.com' });
    expect(fake.lastMailTo('gone@example.com')).toBeDefined();
  });

  test('refusing without an address refuses everyone', async () => {
    await control({ smtp: 'refuse' });
    await expect(send({ to: 'ann@example.com' })).rejects.toMatchObject({ responseCode: 550 });
  });

  test('an order that is not known is answered with 400 and changes nothing', async () => {
    for (const body of [{}, { smtp: 'sideways' }, { smtp: 'refuse', address: 7 }, { smtp: 'refuse', address: '' }]) {
      expect((await control(body)).status).toBe(400);
    }
    await send({ to: 'ann@example.com' });
    expect(fake.messages()).toHaveLength(1);
  });
});

describe('the mailbox over HTTP', () => {
  test('the list as JSON shows one address only when asked for it, and is empty after DELETE', async () => {
    await send({ to: 'ann@example.com' });
    await send({ to: 'bob@example.com' });
    expect(await (await fetchPage('/api/messages')).json()).toHaveLength(2);
    expect(await (await fetchPage('/api/messages?to=bob@example.com')).json()).toMatchObject([
      { to: ['bob@example.com'] },
    ]);
    expect((await fetchPage('/api/messages', { method: 'DELETE' })).status).toBe(204);
    expect(await (await fetchPage('/api/messages')).json()).toEqual([]);
  });

  test('a page of a mail escapes what the mail says and makes its web addresses links', async () => {
    await send({
      to: 'ann@example.com',
      subject: '<script>alert(1)</script>',
      text: 'See http://localhost:8080/orders/a1?b=2&c=3.',
    });
    const list = await (await fetchPage('/')).text();
    expect(list).not.toContain('<script>');
    const page = await (await fetchPage(`/messages/${fake.messages()[0]?.id}`)).text();
    expect(page).not.toContain('<script>');
    expect(page).toContain('href="http://localhost:8080/orders/a1?b=2&#38;c=3"');
  });

  test('the HTML of a mail comes in a sandboxed frame and may load nothing', async () => {
    await send({ to: 'ann@example.com', html: '<a href="http://localhost:8080/">Shop</a>' });
    const where = `/messages/${fake.messages()[0]?.id}`;
    expect(await (await fetchPage(where)).text()).toMatch(
      /<iframe[^>]+sandbox="allow-popups allow-popups-to-escape-sandbox"/,
    );
    const framed = await fetchPage(`${where}/html`);
    expect(framed.headers.get('content-security-policy')).toContain("default-src 'none'");
    expect(await framed.text()).toContain('<base target="_blank"><a href="http://localhost:8080/">');
  });

  test('an attachment is given as a download with its own name and type', async () => {
    await send({ to: 'ann@example.com', attachments: [{ filename: 'collection.ics', content: 'BEGIN:VCALENDAR' }] });
    const file = await fetchPage(`/messages/${fake.messages()[0]?.id}/attachments/0`);
    expect(file.headers.get('content-disposition')).toMatch(/^attachment; filename="?collection\.ics"?$/);
    expect(file.headers.get('content-type')).toContain('text/calendar');
    expect(await file.text()).toBe('BEGIN:VCALENDAR');
  });

  test('a mail or an attachment that is not there is answered with 404', async () => {
    await send({ to: 'ann@example.com' });
    expect((await fetchPage('/messages/none')).status).toBe(404);
    expect((await fetchPage(`/messages/${fake.messages()[0]?.id}/attachments/0`)).status).toBe(404);
    expect((await fetchPage('/api/messages/none/bounce', { method: 'POST' })).status).toBe(404);
  });
});
