import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { medicineRecord } from '#db/schema/herd.ts';
import { makeCollectionPoint } from '#tests/support/make-collection-point.ts';
import { makeAnimal, makeCuttingDay, makeFarm } from '#tests/support/make-farm.ts';
import { makeTraditionalSide } from '#tests/support/make-specification.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import type { CarcaseSummary, CuttingDay } from '#shared/contracts/carcases.ts';
import { addDays, addMonths } from '#shared/domain/day.ts';
import { formatDayWithYear } from '#shared/domain/words.ts';
import type { Problem } from '#shared/errors.ts';

let world: World;
let owner: ReturnType<World['request']>;
let specificationId: string;
let daysMade = 0;

beforeAll(async () => {
  world = await startWorld();
  await makeFarm(world.db);
  specificationId = (await makeTraditionalSide(world.db)).id;
  owner = world.request((await world.signIn('owner')).cookie);
});
afterAll(() => world.stop());

const today = () => world.clock.today();
/** Every test has a cutting day of its own. */
const aDay = () => makeCuttingDay(world.db, today(), { day: addDays(today(), 20 + (daysMade += 1)), specificationId });
const anAnimal = (more = {}) => makeAnimal(world.db, { born: addMonths(today(), -26), liveGrams: 620_000, ...more });

describe('a cutting day', () => {
  const wanted = (more = {}) => ({
    day: addDays(today(), 100 + (daysMade += 1)),
    cutOffDay: addDays(today(), 98),
    cutOffTime: '18:00',
    specificationId,
    collections: [],
    ...more,
  });

  test('is added with its collection slots', async () => {
    const point = await makeCollectionPoint(world.db);
    const body = wanted();
    const collection = {
      pointId: point.id,
      day: addDays(body.day, 1),
      from: '10:00',
      to: '11:45',
      slotMinutes: 30,
      capacity: 6,
    };
    const answer = await owner
      .post('/api/cutting-days')
      .send({ ...body, collections: [collection] })
      .expect(200);
    expect(answer.body).toMatchObject({
      day: body.day,
      state: 'planned',
      figuresVersion: 1,
      carcases: [],
      coldGrams: 0,
    });
    const { id } = answer.body as CuttingDay;
    const collections = await world.request().get(`/api/cutting-days/${id}/collections`).expect(200);
    const { points } = collections.body as { points: { slots: unknown[] }[] };
    expect(points[0]?.slots).toHaveLength(3);
  });

  test('that is planned already is refused beside the field', async () => {
    const body = wanted();
    await owner.post('/api/cutting-days').send(body).expect(200);
    const answer = await owner.post('/api/cutting-days').send(body).expect(409);
    expect((answer.body as Problem).fields).toHaveProperty('day');
  });

  test.each([
    ['in the past', () => ({ day: addDays(today(), -1), cutOffDay: addDays(today(), -3) }), 'day'],
    ['whose cut-off comes after it', () => ({ cutOffDay: addDays(today(), 400) }), 'cutOffDay'],
    ['whose cut-off has passed', () => ({ cutOffDay: addDays(today(), -1) }), 'cutOffDay'],
    ['of no specification', () => ({ specificationId: '00000000-0000-4000-8000-000000000000' }), 'specificationId'],
    ['that does not exist', () => ({ day: '2027-02-30' }), 'day'],
  ])('%s is refused beside the field', async (_name, more, field) => {
    const answer = await owner.post('/api/cutting-days').send(wanted(more())).expect(400);
    expect((answer.body as Problem).fields).toHaveProperty(field);
  });

  test('is seen by the packer and planned by the owner alone', async () => {
    const packer = world.request((await world.signIn('packer')).cookie);
    const day = await aDay();
    await packer.get(`/api/cutting-days/${day.id}`).expect(200);
    await packer.get('/api/cutting-days').expect(200);
    await packer.post('/api/cutting-days').send(wanted()).expect(403);
    await packer.post(`/api/cutting-days/${day.id}/close`).send({ version: 1 }).expect(403);
    await world.request().get('/api/cutting-days').expect(401);
  });
});

describe('booking', () => {
  test('two animals makes carcases on estimated weights and raises the figures', async () => {
    const day = await aDay();
    const animals = [await anAnimal(), await anAnimal({ sex: 'heifer', liveGrams: 560_000 })];
    const body = { animalIds: animals.map(({ id }) => id), killDay: addDays(today(), 3), cuttingDayId: day.id };
    const answer = await owner.post('/api/carcases').send(body).expect(200);
    const { carcases } = answer.body as { carcases: CarcaseSummary[] };
    expect(carcases).toHaveLength(2);
    // Killing-out of 54 and 53 per cent, less 2 per cent to the cold weight.
    const cold = carcases.map((carcase) => carcase.coldGrams).sort();
    expect(cold).toEqual([290_864, 328_104]);
    expect(carcases.every((carcase) => carcase.coldSource === 'estimated')).toBe(true);
    const after = (await owner.get(`/api/cutting-days/${day.id}`).expect(200)).body as CuttingDay;
    expect(after).toMatchObject({ figuresVersion: day.figuresVersion + 1, coldGrams: 290_864 + 328_104 });
  });

  test('an animal twice is refused, and with it everything of that booking', async () => {
    const day = await aDay();
    const first = await anAnimal();
    const second = await anAnimal();
    const booking = (animalIds: string[]) => ({ animalIds, killDay: addDays(today(), 3), cuttingDayId: day.id });
    await owner
      .post('/api/carcases')
      .send(booking([first.id]))
      .expect(200);
    const answer = await owner
      .post('/api/carcases')
      .send(booking([second.id, first.id]))
      .expect(400);
    expect((answer.body as Problem).fields?.animalIds).toContain('booked already');
    const after = (await owner.get(`/api/cutting-days/${day.id}`).expect(200)).body as CuttingDay;
    expect(after.carcases).toHaveLength(1);
  });

  test('for a kill day in the past is refused', async () => {
    const day = await aDay();
    const animal = await anAnimal();
    const body = { animalIds: [animal.id], killDay: addDays(today(), -1), cuttingDayId: day.id };
    const answer = await owner.post('/api/carcases').send(body).expect(400);
    expect((answer.body as Problem).fields?.killDay).toContain('has passed');
  });

  test('for a kill day before birth is refused and names the birth date', async () => {
    const day = await aDay();
    const animal = await anAnimal({ born: addDays(today(), 9) });
    const body = { animalIds: [animal.id], killDay: addDays(today(), 3), cuttingDayId: day.id };
    const answer = await owner.post('/api/carcases').send(body).expect(400);
    expect((answer.body as Problem).fields?.killDay).toContain(formatDayWithYear(addDays(today(), 9)));
  });

  test('inside the withdrawal period of a medicine is refused and names the day on which it ends', async () => {
    const day = await aDay();
    const animal = await anAnimal();
    const dose = { animalId: animal.id, product: 'Penicillin', givenOn: addDays(today(), -5), withdrawalDays: 14 };
    await world.db.insert(medicineRecord).values(dose);
    const clear = addDays(today(), 10);
    const body = (killDay: string) => ({ animalIds: [animal.id], killDay, cuttingDayId: day.id });
    const answer = await owner
      .post('/api/carcases')
      .send(body(addDays(clear, -1)))
      .expect(400);
    expect((answer.body as Problem).fields?.killDay).toContain(formatDayWithYear(clear));
    await owner.post('/api/carcases').send(body(clear)).expect(200);
  });

  test('after the cutting day, or without a live weight, is refused', async () => {
    const day = await aDay();
    const animal = await anAnimal();
    const late = { animalIds: [animal.id], killDay: addDays(day.day, 1), cuttingDayId: day.id };
    const answer = await owner.post('/api/carcases').send(late).expect(400);
    expect((answer.body as Problem).fields).toHaveProperty('killDay');
    const unweighed = await anAnimal({ liveGrams: null });
    const blind = { animalIds: [unweighed.id], killDay: addDays(today(), 3), cuttingDayId: day.id };
    const second = await owner.post('/api/carcases').send(blind).expect(400);
    expect((second.body as Problem).fields?.animalIds).toContain('live weight');
  });
});
