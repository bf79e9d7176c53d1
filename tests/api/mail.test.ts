import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, beforeEach, expect, test } from 'vitest';
import { mailMessage } from '#db/schema/mail.ts';
import { queueMail } from '#server/mail/outbox.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { makeConfirmedOrder, makeStall, type Stall } from '#tests/support/make-order.ts';
import { takeConsole } from '#tests/support/quiet-console.ts';

let world: World;
let stall: Stall;

beforeAll(async () => {
  world = await startWorld();
  stall = await makeStall(world);
});
afterAll(() => world.stop());
beforeEach(() => world.mail.control({ smtp: 'up' }));

const letter = { kind: 'test', subject: 'A letter', text: 'Words.', html: '<p>Words.</p>' };

async function rowOf(mailId: string | null) {
  const [row] = await world.db
    .select()
    .from(mailMessage)
    .where(eq(mailMessage.id, mailId ?? ''));
  return row;
}

/** What time does to jobs that wait for their next try. */
async function makeJobsDue(): Promise<void> {
  await world.db.execute('update graphile_worker._private_jobs set run_at = now() where run_at > now()');
}

test('a confirmed order mails its private link, its lines and its collection, in HTML and in text', async () => {
  const order = await makeConfirmedOrder(world, stall, {
    name: '<script>alert(1)</script> Ölaf 🐄',
    email: 'olaf@example.com',
    lines: [
      { offerId: stall.boxOffer.id, quantity: 1 },
      { offerId: stall.looseOffer.id, quantity: 2 },
    ],
  });
  await world.runJobs();
  const mail = await world.mail.waitForMail('olaf@example.com');
  expect(mail.subject).toBe(`Order ${order.orderNo} is confirmed · Skelderwick`);
  expect(mail.from).toContain('farm@example.com');
  const link = `${world.origin}/orders/${order.token}`;
  for (const words of [
    link,
    '1 × Hearth, at least 5.0 kg',
    '2 × Rump steak, up to 650 g',
    '£120.00',
    'The farm gate',
  ]) {
    expect(mail.text).toContain(words);
    expect(mail.html).toContain(words);
  }
  expect(mail.html).toContain('&lt;script&gt;alert(1)&lt;/script&gt; Ölaf 🐄');
  expect(mail.html).not.toContain('<script>');
  expect(mail.html).toContain('name="viewport"');
  expect((await world.request().get(`/api/orders/${order.token}`)).body).toMatchObject({ orderNo: order.orderNo });
});

test('a mail is not lost while the mail server is down, and arrives once under one Message-ID', async () => {
  world.mail.control({ smtp: 'down' });
  const mailId = await queueMail(world.db, { ...letter, eventKey: 'down then up', to: 'gus@example.com' });
  await world.runJobs();
  expect(takeConsole()).toEqual([expect.stringContaining('send-mail')]);
  const waiting = await rowOf(mailId);
  expect(waiting).toMatchObject({ state: 'queued', attempts: 1 });
  expect(waiting?.lastError).toBeTruthy();
  expect(world.mail.lastMailTo('gus@example.com')).toBeUndefined();

  world.mail.control({ smtp: 'up' });
  await makeJobsDue();
  await world.runJobs();
  expect(await rowOf(mailId)).toMatchObject({ state: 'sent', attempts: 2, lastError: null });
  const arrived = world.mail.messages().filter((mail) => mail.to.includes('gus@example.com'));
  expect(arrived.map((mail) => mail.messageId)).toEqual([waiting?.messageId]);
  await makeJobsDue();
  await world.runJobs();
  expect(world.mail.messages().filter((mail) => mail.to.includes('gus@example.com'))).toHaveLength(1);
});

test('the same event never writes a second mail', async () => {
  const again = { ...letter, eventKey: 'once', to: 'hal@example.com' };
  const ids = await Promise.all([queueMail(world.db, again), queueMail(world.db, again), queueMail(world.db, again)]);
  expect(ids.filter((id) => id !== null)).toHaveLength(1);
  await world.runJobs();
  expect(world.mail.messages().filter((mail) => mail.to.includes('hal@example.com'))).toHaveLength(1);
});

test('a mail queued in a transaction that fails is never sent', async () => {
  const failing = world.db.transaction(async (tx) => {
    await queueMail(tx, { ...letter, eventKey: 'undone', to: 'ida@example.com' });
    throw new Error('undone');
  });
  await expect(failing).rejects.toThrow('undone');
  await world.runJobs();
  expect(world.mail.lastMailTo('ida@example.com')).toBeUndefined();
});

test('an address that the mail server refuses for good counts as bounced at once', async () => {
  world.mail.control({ smtp: 'refuse', address: 'jan@example.com' });
  const mailId = await queueMail(world.db, { ...letter, eventKey: 'refused', to: 'jan@example.com' });
  await world.runJobs();
  expect(await rowOf(mailId)).toMatchObject({ state: 'bounced', attempts: 1 });
});

test('after the last try a mail counts as failed and waits for a person', async () => {
  world.mail.control({ smtp: 'down' });
  const mailId = await queueMail(world.db, { ...letter, eventKey: 'worn out', to: 'kit@example.com' });
  await world.db
    .update(mailMessage)
    .set({ attempts: 9 })
    .where(eq(mailMessage.id, mailId ?? ''));
  await world.runJobs();
  expect(await rowOf(mailId)).toMatchObject({ state: 'failed', attempts: 10 });
});

test('the database refuses an address or a subject with a line break', async () => {
  for (const more of [
    { to: 'a@example.com\r\nBcc: b@example.com' },
    { to: 'a@example.com', subject: 'Hello\nBcc: b' },
  ]) {
    const eventKey = `injected ${JSON.stringify(more)}`;
    await expect(queueMail(world.db, { ...letter, ...more, eventKey })).rejects.toThrow();
  }
});

function post(body: string, token = world.deps.mailInboundToken) {
  return world
    .request()
    .post('/api/mail/inbound')
    .set('Content-Type', 'message/rfc822')
    .set('Authorization', `Bearer ${token}`)
    .send(body);
}

function report(messageId: string, { action = 'failed', address = 'liz@example.com' } = {}): string {
  return [
    'From: mailer-daemon@example.com',
    'Content-Type: multipart/report; report-type=delivery-status; boundary="cut"',
    'MIME-Version: 1.0',
    '',
    '--cut',
    'Content-Type: message/delivery-status',
    '',
    'Reporting-MTA: dns; mx.example.com',
    '',
    `Final-Recipient: rfc822; ${address}`,
    `Action: ${action}`,
    'Status: 5.2.2',
    'Diagnostic-Code: smtp; 552 5.2.2',
    '  The mailbox is full',
    '',
    '--cut',
    'Content-Type: text/rfc822-headers',
    '',
    `Message-ID: ${messageId}`,
    'To: liz@example.com',
    '',
    '--cut--',
    '',
  ].join('\r\n');
}

test('a delivery report counts only with the right token, for the right address, when it says failed', async () => {
  const mailId = await queueMail(world.db, { ...letter, eventKey: 'reported', to: 'Liz@example.com' });
  await world.runJobs();
  const messageId = (await rowOf(mailId))?.messageId ?? '';
  expect((await post(report(messageId), 'a wrong token')).status).toBe(401);
  expect((await world.request().post('/api/mail/inbound').send('x')).status).toBe(401);
  for (const ignored of [
    report(messageId, { action: 'delayed' }),
    report(messageId, { address: 'other@example.com' }),
    report('<unknown@example.com>'),
    'Subject: hello\r\n\r\nNo report at all.',
    '',
  ]) {
    expect((await post(ignored)).status).toBe(204);
    expect((await rowOf(mailId))?.state).toBe('sent');
  }
  expect((await post(report(messageId))).status).toBe(204);
  expect(await rowOf(mailId)).toMatchObject({ state: 'bounced', lastError: '552 5.2.2 The mailbox is full' });
});
