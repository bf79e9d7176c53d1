import { inflateSync } from 'node:zlib';
import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { customerOrder } from '#db/schema/orders.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import {
  basketFor,
  makeConfirmedOrder,
  makePackedOrder,
  makeStall,
  place,
  type Stall,
} from '#tests/support/make-order.ts';

let world: World;
let stall: Stall;

beforeAll(async () => {
  world = await startWorld();
  stall = await makeStall(world);
});
afterAll(() => world.stop());

const setState = (id: string, state: 'collected' | 'confirmed') =>
  world.db.update(customerOrder).set({ state }).where(eq(customerOrder.id, id));

/** The words of a PDF that was written with subset fonts: each font's own table says which letter a glyph number is. */
function wordsOf(pdf: Buffer): string {
  const raw = pdf.toString('latin1');
  const streams = [...raw.matchAll(/stream\r?\n([\s\S]*?)\r?\nendstream/g)].map((match) => inflated(match[1] ?? ''));
  const letters = new Map<string, string>();
  const fonts = streams.filter((text) => text.includes('beginbfrange'));
  const pages = streams.filter((text) => / Tf/.test(text));
  const texts = fonts.map((font) => {
    letters.clear();
    for (const [, body = ''] of font.matchAll(/beginbfrange\n[^[]*\[([^\]]*)\]/g)) {
      [...body.matchAll(/<([0-9a-f]+)>/g)].forEach(([, code = ''], at) =>
        letters.set(at.toString(16).padStart(4, '0'), String.fromCodePoint(parseInt(code.slice(0, 4), 16))),
      );
    }
    return pages
      .flatMap((page) => [...page.matchAll(/\[([^\]]*)\] TJ/g)])
      .map(([, shown = '']) =>
        [...shown.matchAll(/<([0-9a-f]+)>/g)]
          .flatMap(([, hex = '']) => hex.match(/.{4}/g) ?? [])
          .map((glyph) => letters.get(glyph) ?? '')
          .join(''),
      )
      .join('\n');
  });
  return texts.join('\n');
}

function inflated(stream: string): string {
  try {
    return inflateSync(Buffer.from(stream, 'latin1')).toString('latin1');
  } catch {
    return '';
  }
}

const fetchPdf = (token: string) =>
  world
    .request()
    .get(`/api/orders/${token}/receipt.pdf`)
    .buffer(true)
    .parse((response, done) => {
      const chunks: Buffer[] = [];
      response.on('data', (chunk: Buffer) => chunks.push(chunk));
      response.on('end', () => done(null, Buffer.concat(chunks)));
    });

describe('a receipt', () => {
  test('of a packed order, names lines, total, payment and real weights, in a PDF', async () => {
    const { order, pack } = await makePackedOrder(world, stall, { name: 'Ölaf & Sons' });
    const answer = await fetchPdf(order.token).expect(200);
    expect(answer.headers['content-type']).toBe('application/pdf');
    expect(answer.headers['content-disposition']).toBe(`attachment; filename="receipt-order-${order.orderNo}.pdf"`);
    const pdf = answer.body as Buffer;
    expect(pdf.subarray(0, 5).toString()).toBe('%PDF-');
    const words = wordsOf(pdf);
    for (const part of [
      `Receipt for order ${order.orderNo}`,
      'For Ölaf & Sons',
      '1 × Hearth, at least 5.0 kg',
      '£94.00',
      `Rump steak (${pack.code})`,
      '0.612 kg',
      'Skelderwick Farm',
    ]) {
      expect(words).toContain(part);
    }
  });

  test('of a cancelled order, names what was paid back', async () => {
    const order = await makeConfirmedOrder(world, stall);
    await world.request().post(`/api/orders/${order.token}/cancel`).expect(200);
    await world.runJobs();
    await world.payments.flush();
    const words = wordsOf((await fetchPdf(order.token).expect(200)).body as Buffer);
    expect(words).toContain('−£94.00');
    expect(words).toContain('£0.00');
  });

  test('of an order that is not paid, or of none, is not there', async () => {
    const placed = await place(world, basketFor(stall));
    expect((await world.request().get(`/api/orders/${placed.token}/receipt.pdf`)).status).toBe(404);
    expect((await world.request().get(`/api/orders/${'x'.repeat(32)}/receipt.pdf`)).status).toBe(404);
  });
});

describe('feedback', () => {
  test('before the order is handed over is refused; afterwards it is kept once, and the last word counts', async () => {
    const order = await makeConfirmedOrder(world, stall, { name: 'Dora' });
    const path = `/api/orders/${order.token}/feedback`;
    expect((await world.request().get(path).expect(200)).body).toEqual({ canGive: false, given: null });
    await world.request().put(path).send({ stars: 5, words: 'Lovely' }).expect(409);
    await setState(order.id, 'collected');
    for (const stars of [0, 6, 2.5]) await world.request().put(path).send({ stars, words: '' }).expect(400);
    await world.request().put(path).send({ stars: 2, words: 'Tough' }).expect(200);
    const answer = await world.request().put(path).send({ stars: 4, words: '<b>Better</b> stewed 🐄' }).expect(200);
    expect(answer.body).toMatchObject({ canGive: true, given: { stars: 4, words: '<b>Better</b> stewed 🐄' } });

    const owner = world.request((await world.signIn('owner')).cookie);
    const list = (await owner.get('/api/office/feedback').expect(200)).body as { boxes: unknown; feedback: unknown };
    expect(list).toMatchObject({
      boxes: [{ name: 'Hearth', count: 1, averageTenths: 40 }],
      feedback: [{ orderNo: order.orderNo, name: 'Dora', stars: 4, lines: ['1 × Hearth'] }],
    });
  });
});
