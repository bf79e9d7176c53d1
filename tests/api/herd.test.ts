import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import type { Animal } from '#shared/contracts/herd.ts';
import { addDays, addMonths } from '#shared/domain/day.ts';
import { earTagCheckDigit } from '#shared/domain/ear-tag.ts';
import type { Problem } from '#shared/errors.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { makeAnimal, makeCarcase, makeCuttingDay, makeFarm } from '#tests/support/make-farm.ts';

let world: World;
let owner: ReturnType<World['request']>;
let numbers = 50_000;

beforeAll(async () => {
  world = await startWorld();
  await makeFarm(world.db);
  owner = world.request((await world.signIn('owner')).cookie);
});
afterAll(() => world.stop());

function earTag(number = (numbers += 1)): string {
  return `UK123450${earTagCheckDigit(123_450, number)}${String(number).padStart(5, '0')}`;
}

const beast = (more: Partial<Animal> = {}) => ({
  earTag: earTag(),
  breed: 'Beef Shorthorn',
  sex: 'steer',
  born: addDays(addMonths(world.clock.today(), -22), -3),
  damEarTag: null,
  liveGrams: 598_000,
  ...more,
});

const countAnimals = async () =>
  ((await owner.get('/api/animals').expect(200)).body as { animals: Animal[] }).animals.length;

describe('adding an animal', () => {
  test('with an ear tag as people type it keeps the tag in full', async () => {
    const tag = earTag();
    const typed = `uk ${tag.slice(2, 8)} ${tag.slice(8)}`;
    const answer = await owner
      .post('/api/animals')
      .send(beast({ earTag: typed }))
      .expect(200);
    expect(answer.body).toMatchObject({
      earTag: tag,
      breed: 'Beef Shorthorn',
      ageMonths: 22,
      carcase: null,
      version: 1,
    });
    const { animals } = (await owner.get('/api/animals').expect(200)).body as { animals: Animal[] };
    expect(animals.map((animal) => animal.earTag)).toContain(tag);
  });

  test('with a wrong check digit is refused beside the field and adds nothing', async () => {
    const before = await countAnimals();
    const tag = earTag();
    const wrong = `${tag.slice(0, 8)}${(Number(tag.slice(8, 9)) % 7) + 1}${tag.slice(9)}`;
    const answer = await owner
      .post('/api/animals')
      .send(beast({ earTag: wrong }))
      .expect(400);
    const problem = answer.body as Problem;
    expect(problem.code).toBe('INVALID_INPUT');
    expect(problem.fields?.earTag).toContain('check digit');
    expect(answer.headers['content-type']).toContain('application/problem+json');
    expect(await countAnimals()).toBe(before);
  });

  test('that is in the herd already is refused beside the field', async () => {
    const known = beast();
    await owner.post('/api/animals').send(known).expect(200);
    const before = await countAnimals();
    const answer = await owner.post('/api/animals').send(known).expect(409);
    expect(answer.body).toMatchObject({ code: 'ALREADY_KNOWN' });
    expect((answer.body as Problem).fields?.earTag).toContain('in the herd already');
    expect(await countAnimals()).toBe(before);
  });

  test.each([
    ['born tomorrow', { born: 'tomorrow' }, 'born'],
    ['with a live weight of 0', { liveGrams: 0 }, 'liveGrams'],
    ['with a negative live weight', { liveGrams: -600_000 }, 'liveGrams'],
    ['with a live weight in words', { liveGrams: 'heavy' }, 'liveGrams'],
    ['with a live weight of fourteen digits', { liveGrams: 12_345_678_901_234 }, 'liveGrams'],
    ['of no sex we know', { sex: 'ox' }, 'sex'],
    ['with a line break in its breed', { breed: 'Here\nford' }, 'breed'],
    ['with a field we do not know', { price: 12 }, 'price'],
  ])('%s is refused beside its field', async (_name, more, field) => {
    const before = await countAnimals();
    const body = { ...beast(), ...more, ...('born' in more ? { born: addDays(world.clock.today(), 1) } : {}) };
    const answer = await owner.post('/api/animals').send(body).expect(400);
    expect((answer.body as Problem).fields).toHaveProperty(field);
    expect(await countAnimals()).toBe(before);
  });
});

describe('editing an animal', () => {
  test('by two owners at once saves the first and tells the second', async () => {
    const added = (await owner.post('/api/animals').send(beast()).expect(200)).body as Animal;
    const { id, version } = added;
    const edit = { ...beast({ earTag: added.earTag }), version };
    await owner
      .put(`/api/animals/${id}`)
      .send({ ...edit, breed: 'Hereford' })
      .expect(200);
    const second = await owner
      .put(`/api/animals/${id}`)
      .send({ ...edit, breed: 'Luing' })
      .expect(409);
    expect(second.body).toMatchObject({ code: 'STATE_CHANGED', figures: { yourVersion: 1, presentVersion: 2 } });
    const { animals } = (await owner.get('/api/animals').expect(200)).body as { animals: Animal[] };
    expect(animals.find((animal) => animal.id === id)).toMatchObject({ breed: 'Hereford', version: 2 });
  });

  test('to a tag of another animal is refused', async () => {
    const first = (await owner.post('/api/animals').send(beast()).expect(200)).body as Animal;
    const second = (await owner.post('/api/animals').send(beast()).expect(200)).body as Animal;
    const edit = { ...beast({ earTag: first.earTag }), version: second.version };
    const answer = await owner.put(`/api/animals/${second.id}`).send(edit).expect(409);
    expect(answer.body).toMatchObject({ code: 'ALREADY_KNOWN' });
  });

  test('that is booked for kill keeps its birth date', async () => {
    const row = await makeAnimal(world.db);
    const day = await makeCuttingDay(world.db, world.clock.today());
    await makeCarcase(world.db, day.id, { animalId: row.id });
    const { earTag: tag, breed, sex, damEarTag, liveGrams, version } = row;
    const edit = { earTag: tag, breed, sex, damEarTag, liveGrams, version, born: addDays(row.born, 40) };
    const answer = await owner.put(`/api/animals/${row.id}`).send(edit).expect(409);
    expect((answer.body as Problem).detail).toContain('birth date');
  });

  test('that does not exist answers 404', async () => {
    const nobody = '00000000-0000-4000-8000-000000000000';
    await owner
      .put(`/api/animals/${nobody}`)
      .send({ ...beast(), version: 1 })
      .expect(404);
    await owner
      .put('/api/animals/17')
      .send({ ...beast(), version: 1 })
      .expect(404);
  });
});

describe('the medicine book', () => {
  let animal: Animal;
  beforeEach(async () => {
    animal = (await owner.post('/api/animals').send(beast()).expect(200)).body as Animal;
  });

  test('says from when on no withdrawal period is running', async () => {
    const givenOn = addDays(world.clock.today(), -4);
    const dose = { product: 'Fluke drench', givenOn, withdrawalDays: 56 };
    const answer = await owner.post(`/api/animals/${animal.id}/medicines`).send(dose).expect(200);
    // The day on which the period ends still counts: the book holds no hour.
    expect(answer.body).toMatchObject({ withdrawalClearDay: addDays(givenOn, 57) });
    expect((answer.body as Animal).medicines).toMatchObject([dose]);
  });

  test('takes no dose of a day to come, or from before birth', async () => {
    for (const givenOn of [addDays(world.clock.today(), 1), addDays(animal.born, -1)]) {
      const dose = { product: 'Wormer', givenOn, withdrawalDays: 35 };
      const answer = await owner.post(`/api/animals/${animal.id}/medicines`).send(dose).expect(400);
      expect((answer.body as Problem).fields).toHaveProperty('givenOn');
    }
  });

  test('takes no dose whose withdrawal period reaches over the booked kill day, and names that day', async () => {
    const day = await makeCuttingDay(world.db, world.clock.today(), { day: addDays(world.clock.today(), 30) });
    await makeCarcase(world.db, day.id, { animalId: animal.id, killDay: addDays(world.clock.today(), 14) });
    const dose = { product: 'Penicillin', givenOn: world.clock.today(), withdrawalDays: 21 };
    const answer = await owner.post(`/api/animals/${animal.id}/medicines`).send(dose).expect(400);
    expect((answer.body as Problem).fields?.withdrawalDays).toContain('booked for kill');
  });
});

describe('the herd', () => {
  test('is open to the owner alone', async () => {
    await world.request().get('/api/animals').expect(401);
    for (const role of ['customer', 'butcher', 'packer'] as const) {
      const caller = world.request((await world.signIn(role)).cookie);
      await caller.get('/api/animals').expect(403);
      await caller.post('/api/animals').send(beast()).expect(403);
    }
  });
});
