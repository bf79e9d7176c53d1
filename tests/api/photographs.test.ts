import { afterAll, beforeAll, expect, test } from 'vitest';
import { startWorld, type World } from '#tests/support/harness.ts';
import { makeStall, type Stall } from '#tests/support/make-order.ts';
import { makePng } from '#tests/support/make-picture.ts';

let world: World;
let stall: Stall;
let owner: string;

beforeAll(async () => {
  world = await startWorld();
  stall = await makeStall(world);
  owner = (await world.signIn('owner')).cookie;
});
afterAll(() => world.stop());

type List = { photographs: { id: string; href: string; width: number; height: number; alt: string }[] };

const send = (body: Buffer, { cookie = owner, type = 'image/png', alt = 'A box of beef' } = {}) =>
  world
    .request(cookie)
    .post(`/api/office/box-kinds/${stall.box.id}/photographs`)
    .query({ alt })
    .set('Content-Type', type)
    .send(body);

const shown = async () => (await world.request().get('/api/boxes/hearth/photographs').expect(200)).body as List;

test('a photograph, added twice, is shown once with its size, and kept by browsers for ever', async () => {
  expect(await shown()).toEqual({ photographs: [] });
  const picture = makePng(600, 400);
  await send(picture).expect(200);
  await send(picture).expect(200);
  const { photographs } = await shown();
  expect(photographs).toMatchObject([{ width: 600, height: 400, alt: 'A box of beef' }]);
  const answer = await world
    .request()
    .get(photographs[0]?.href ?? '')
    .expect(200);
  expect(answer.headers['content-type']).toBe('image/png');
  expect(answer.headers['cache-control']).toBe('public, max-age=31536000, immutable');
  expect(answer.headers['x-content-type-options']).toBe('nosniff');
  expect(answer.headers['content-disposition']).toBeUndefined();
  expect(Buffer.compare(answer.body as Buffer, picture)).toBe(0);
  await world.request(owner).delete(`/api/office/photographs/${photographs[0]?.id}`).expect(200);
  await world.request(owner).delete(`/api/office/photographs/${photographs[0]?.id}`).expect(404);
  expect(await shown()).toEqual({ photographs: [] });
});

test('what only calls itself a picture, is too large or of no box, is refused and not kept', async () => {
  await send(Buffer.from('<svg xmlns="http://www.w3.org/2000/svg" onload="alert(1)"/>')).expect(400);
  await send(makePng(4_100, 2)).expect(400);
  await send(Buffer.concat([makePng(10, 10), Buffer.alloc(2_100_000)])).expect(413);
  await send(Buffer.concat([makePng(10, 10), Buffer.alloc(3_500_000)])).expect(413);
  await send(makePng(10, 10), { alt: ' ' }).expect(400);
  await send(Buffer.from('{}'), { type: 'application/json' }).expect(400);
  await send(makePng(10, 10), { cookie: (await world.signIn('packer')).cookie }).expect(403);
  expect(await shown()).toEqual({ photographs: [] });
  await world
    .request()
    .get(`/api/photographs/${'a'.repeat(64)}`)
    .expect(404);
});
