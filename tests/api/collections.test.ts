import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { mailMessage } from '#db/schema/mail.ts';
import type { CollectionMail, Mail, RunSheet } from '#shared/contracts/packs.ts';
import { formatDayTime } from '#shared/domain/words.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import {
  getOrderRow,
  makeConfirmedOrder,
  makePackedOrder,
  makeStall,
  place,
  basketFor,
  type Stall,
} from '#tests/support/make-order.ts';

let world: World;
let stall: Stall;
let owner: string;
let packer: string;

beforeAll(async () => {
  world = await startWorld();
  stall = await makeStall(world, { boxes: 60 });
  owner = (await world.signIn('owner')).cookie;
  packer = (await world.signIn('packer')).cookie;
});
afterAll(() => world.stop());

const mailsPath = () => `/api/cutting-days/${stall.day.id}/collection-mails`;

async function listMailOf(orderId: string): Promise<CollectionMail> {
  const answer = await world.request(owner).get(mailsPath());
  const mail = (answer.body as { mails: CollectionMail[] }).mails.find((each) => each.orderId === orderId);
  if (!mail) throw new Error(`No collection mail is listed: ${answer.text}`);
  return mail;
}

test('the list shows each mail as it would go out, and holds back an order that is not packed', async () => {
  const { order } = await makePackedOrder(world, stall, { name: 'Ben Gill', email: 'ben@example.com' });
  const waiting = await makeConfirmedOrder(world, stall);
  const open = await place(world, basketFor(stall));
  const mail = await listMailOf(order.id);
  expect(mail).toMatchObject({ name: 'Ben Gill', email: 'ben@example.com', holdBack: null, mail: null });
  expect(mail.subject).toContain(`Order ${order.orderNo} is ready`);
  for (const words of ['The farm gate', 'Up the lane past the chapel.', 'A cool bag', order.token]) {
    expect(mail.text).toContain(words);
    expect(mail.html).toContain(words);
  }
  expect(mail.text).toContain(formatDayTime(stall.slot.startsAt));
  expect(await listMailOf(waiting.id)).toMatchObject({ holdBack: 'Not all of it is packed yet.' });
  const all = (await world.request(owner).get(mailsPath())).body as { mails: CollectionMail[] };
  expect(all.mails.some((each) => each.orderNo === open.orderNo)).toBe(false);
});

test('confirming sends each mail once, with place, time, calendar file and link, and calls the orders ready', async () => {
  const { order } = await makePackedOrder(world, stall, { email: 'cat@example.com' });
  const body = { orderIds: [order.id, order.id] };
  const answers = await Promise.all([1, 2].map(() => world.request(owner).post(mailsPath()).send(body)));
  expect(answers.map((answer) => answer.status)).toEqual([200, 200]);
  expect(await listMailOf(order.id)).toMatchObject({ holdBack: null, mail: { state: 'queued', attempts: 0 } });
  expect((await getOrderRow(world, order.token)).state).toBe('ready');
  await world.runJobs();
  expect(await listMailOf(order.id)).toMatchObject({ mail: { state: 'sent', attempts: 1 } });
  const sent = world.mail.messages().filter((mail) => mail.subject.startsWith(`Order ${order.orderNo} is ready`));
  expect(sent).toHaveLength(1);
  expect(sent[0]?.to).toEqual(['cat@example.com']);
  const [file] = sent[0]?.attachments ?? [];
  const calendar = Buffer.from(file?.contentBase64 ?? '', 'base64').toString();
  expect(file?.filename).toBe(`collect-order-${order.orderNo}.ics`);
  expect(calendar).toContain('BEGIN:VEVENT');
  expect(calendar).toContain('DTSTART;TZID=Europe/London:');
});

test('confirming with one order that is not packed sends none of them', async () => {
  const { order } = await makePackedOrder(world, stall);
  const waiting = await makeConfirmedOrder(world, stall);
  const answer = await world
    .request(owner)
    .post(mailsPath())
    .send({ orderIds: [order.id, waiting.id] });
  expect(answer.status).toBe(422);
  expect(answer.body).toMatchObject({ code: 'NOT_FILLABLE', figures: { orderNo: waiting.orderNo } });
  expect(await listMailOf(order.id)).toMatchObject({ mail: null });
  expect((await getOrderRow(world, order.token)).state).toBe('packed');
  const stranger = await world
    .request(owner)
    .post(mailsPath())
    .send({ orderIds: [randomUUID()] });
  expect(stranger.status).toBe(404);
});

test('only the owner sees and sends collection mails', async () => {
  for (const [cookie, status] of [
    [undefined, 401],
    [packer, 403],
  ] as const) {
    expect((await world.request(cookie).get(mailsPath())).status).toBe(status);
    expect(
      (
        await world
          .request(cookie)
          .post(mailsPath())
          .send({ orderIds: [randomUUID()] })
      ).status,
    ).toBe(status);
    expect((await world.request(cookie).get('/api/mails')).status).toBe(status);
    expect((await world.request(cookie).post(`/api/mails/${randomUUID()}/resend`)).status).toBe(status);
  }
  expect((await world.request(owner).get(`/api/cutting-days/${randomUUID()}/collection-mails`)).status).toBe(404);
});

test('a mail that bounced can be sent again, one that waits cannot', async () => {
  const { order } = await makePackedOrder(world, stall, { email: 'dan@example.com' });
  await world.runJobs();
  world.mail.control({ smtp: 'refuse', address: 'dan@example.com' });
  await world
    .request(owner)
    .post(mailsPath())
    .send({ orderIds: [order.id] });
  const { mail: queued } = await listMailOf(order.id);
  const early = await world.request(owner).post(`/api/mails/${queued?.id}/resend`);
  expect(early.body).toMatchObject({ code: 'STATE_CHANGED' });
  await world.runJobs();
  const refused = await listMailOf(order.id);
  expect(refused).toMatchObject({ mail: { state: 'bounced', lastError: expect.any(String) as unknown } });
  world.mail.control({ smtp: 'up', address: 'dan@example.com' });
  const again = await world.request(owner).post(`/api/mails/${queued?.id}/resend`);
  expect(again.body).toMatchObject({ state: 'queued', to: 'dan@example.com', lastError: null });
  await world.runJobs();
  expect(await listMailOf(order.id)).toMatchObject({ mail: { state: 'sent' } });
  const list = (await world.request(owner).get('/api/mails')).body as { mails: Mail[] };
  expect(list.mails.find((mail) => mail.id === queued?.id)).toMatchObject({ kind: 'ready to collect', state: 'sent' });
  expect((await world.request(owner).post(`/api/mails/${randomUUID()}/resend`)).status).toBe(404);
});

test('a delivery-status mail marks the mail that it is about as bounced', async () => {
  const { order } = await makePackedOrder(world, stall, { email: 'eve@example.com' });
  await world
    .request(owner)
    .post(mailsPath())
    .send({ orderIds: [order.id] });
  await world.runJobs();
  const { mail } = await listMailOf(order.id);
  const [row] = await world.db
    .select()
    .from(mailMessage)
    .where(eq(mailMessage.id, mail?.id ?? ''));
  const message = world.mail.messages().find((each) => each.messageId === row?.messageId);
  const url = `http://127.0.0.1:${world.mail.httpPort}/api/messages/${message?.id}/bounce`;
  expect((await fetch(url, { method: 'POST' })).status).toBe(200);
  expect(await listMailOf(order.id)).toMatchObject({
    mail: { state: 'bounced', lastError: '550 5.1.1 No such mailbox here' },
  });
});

test('the run sheet gives a packer slots, names and boxes without prices, and the ticks are kept', async () => {
  const { order, pack } = await makePackedOrder(world, stall, { name: 'Flo Dent' });
  await world
    .request(owner)
    .post(mailsPath())
    .send({ orderIds: [order.id] });
  const answer = await world.request(packer).get(`/api/cutting-days/${stall.day.id}/run-sheet`);
  expect(answer.status).toBe(200);
  expect(answer.text).not.toMatch(/pence|price|example\.com/i);
  const sheet = answer.body as RunSheet;
  const line = sheet.slots.flatMap((slot) => slot.orders).find((each) => each.id === order.id);
  expect(line).toMatchObject({ name: 'Flo Dent', items: ['1 × Hearth'], packCount: 1, state: 'ready' });
  expect(pack.grams).toBe(612);

  const path = `/api/office/orders/${order.id}/state`;
  const version = line?.version ?? 0;
  const ticked = await world.request(packer).post(path).send({ version, state: 'collected' });
  expect(ticked.body).toMatchObject({ state: 'collected', version: version + 1 });
  const stale = await world.request(owner).post(path).send({ version, state: 'missed' });
  expect(stale.status).toBe(409);
  expect(stale.body).toMatchObject({ code: 'STATE_CHANGED' });
  const back = await world
    .request(packer)
    .post(path)
    .send({ version: version + 1, state: 'ready' });
  expect(back.body).toMatchObject({ state: 'ready' });
  const missed = await world
    .request(packer)
    .post(path)
    .send({ version: version + 2, state: 'missed' });
  expect(missed.body).toMatchObject({ state: 'missed' });
});

test('an order that is only confirmed cannot be ticked as collected, and strangers tick nothing', async () => {
  const order = await makeConfirmedOrder(world, stall);
  const customer = (await world.signIn('customer')).cookie;
  const path = `/api/office/orders/${order.id}/state`;
  const body = { version: order.version, state: 'collected' };
  expect((await world.request(packer).post(path).send(body)).body).toMatchObject({ code: 'STATE_CHANGED' });
  expect((await world.request(customer).post(path).send(body)).status).toBe(403);
  expect((await world.request().post(path).send(body)).status).toBe(401);
  expect(
    (
      await world
        .request(packer)
        .post(path)
        .send({ ...body, state: 'cancelled' })
    ).status,
  ).toBe(400);
  expect((await world.request(customer).get(`/api/cutting-days/${stall.day.id}/run-sheet`)).status).toBe(403);
  expect((await getOrderRow(world, order.token)).state).toBe('confirmed');
});

test('cancelling a packed order, by the owner, puts its packs back into the chiller', async () => {
  const { order, pack } = await makePackedOrder(world, stall);
  const shown = await world.request().get(`/api/orders/${order.token}`);
  expect(shown.body).toMatchObject({ packs: [{ code: pack.code, cut: 'Rump steak', grams: 612, box: 'Hearth' }] });
  const path = `/api/office/orders/${order.id}/cancel`;
  const done = await world.request(owner).post(path).send({ reason: 'The box was dropped.' });
  expect(done.body).toMatchObject({ state: 'cancelled' });
  expect((await world.request().get(`/api/orders/${order.token}`)).body).toMatchObject({ packs: [] });
  const moves = await world.db.query.stockMovement.findMany({ where: (row, is) => is.eq(row.packId, pack.id) });
  expect(moves.map((move) => move.toPlace).sort()).toEqual(['chiller', 'order']);
});
