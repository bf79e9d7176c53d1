import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { makeAnimal, makeCarcase, makeCuttingDay, makeFarm } from '#tests/support/make-farm.ts';
import { makeTraditionalSide } from '#tests/support/make-specification.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import type { Carcase, CutoutNode, CuttingDay } from '#shared/contracts/carcases.ts';
import { addDays, addMonths } from '#shared/domain/day.ts';
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

async function aCarcase(more: Parameters<typeof makeCarcase>[2] = {}, animal = {}) {
  const day = await aDay();
  const row = await anAnimal(animal);
  const carcase = await makeCarcase(world.db, day.id, { animalId: row.id, killDay: addDays(today(), -2), ...more });
  return { day, animal: row, carcase };
}

const sheet = (more = {}) => ({
  version: 1,
  killDay: addDays(today(), -2),
  weighedAs: 'hot',
  grams: 356_200,
  conformation: 'R',
  fatClass: '4L',
  dressingSpec: null,
  ...more,
});

/** The law of every node: its parts and its weighing difference are the node, to the gram. */
function expectMassConserved(nodes: readonly CutoutNode[]): void {
  for (const node of nodes) {
    const parts = nodes.filter((part) => part.parentPath === node.path);
    if (parts.length === 0) continue;
    const sum = parts.reduce((all, part) => all + part.grams, 0);
    expect(sum + node.weighingDifferenceGrams, node.path).toBe(node.grams);
  }
}

describe('a kill sheet', () => {
  test('in hot weight gives the cold weight, the class and a cutout that conserves every gram', async () => {
    const { carcase, day } = await aCarcase();
    const answer = await owner.put(`/api/carcases/${carcase.id}/kill-sheet`).send(sheet()).expect(200);
    const body = answer.body as Carcase;
    // 356.2 kg hot less 2 per cent: article 7 of Delegated Regulation (EU) 2017/1182.
    expect(body).toMatchObject({ coldGrams: 349_076, coldSource: 'weighed', state: 'hanging', version: 2 });
    expect(body.nodes.filter((node) => node.level === 'side')).toHaveLength(2);
    expect(body.nodes.some((node) => node.level === 'line' && node.kind === 'cut')).toBe(true);
    expectMassConserved(body.nodes);
    const after = (await owner.get(`/api/cutting-days/${day.id}`).expect(200)).body as CuttingDay;
    expect(after.figuresVersion).toBe(day.figuresVersion + 1);
  });

  test('in cold weight wins over any estimate; both classes may be left out', async () => {
    const { carcase } = await aCarcase();
    const body = sheet({ weighedAs: 'cold', grams: 331_500, conformation: null, fatClass: null });
    const answer = await owner.put(`/api/carcases/${carcase.id}/kill-sheet`).send(body).expect(200);
    expect(answer.body).toMatchObject({ coldGrams: 331_500, hotGrams: null, conformation: null });
    expectMassConserved((answer.body as Carcase).nodes);
  });

  test.each([
    ['a weight of 0', { grams: 0 }, { status: 400, field: 'grams' }],
    ['a negative weight', { grams: -356_200 }, { status: 400, field: 'grams' }],
    ['a weight in words', { grams: 'much' }, { status: 400, field: 'grams' }],
    ['a weight of fourteen digits', { grams: 12_345_678_901_234 }, { status: 400, field: 'grams' }],
    ['more than 700 kg cold', { weighedAs: 'cold', grams: 700_001 }, { status: 422, field: 'grams' }],
    ['less than 50 kg cold', { weighedAs: 'cold', grams: 49_999 }, { status: 422, field: 'grams' }],
    ['a conformation that does not exist', { conformation: 'X' }, { status: 400, field: 'conformation' }],
    ['a fat class that does not exist', { fatClass: '9' }, { status: 400, field: 'fatClass' }],
  ])('with %s is refused beside the field and leaves the estimate', async (_name, more, { status, field }) => {
    const { carcase } = await aCarcase();
    const answer = await owner.put(`/api/carcases/${carcase.id}/kill-sheet`).send(sheet(more)).expect(status);
    expect((answer.body as Problem).fields).toHaveProperty(field);
    const after = (await owner.get(`/api/carcases/${carcase.id}`).expect(200)).body as Carcase;
    expect(after).toMatchObject({ coldSource: 'estimated', state: 'booked', version: 1 });
  });

  test('of a day to come is refused', async () => {
    const { carcase } = await aCarcase();
    const body = sheet({ killDay: addDays(today(), 1) });
    const answer = await owner.put(`/api/carcases/${carcase.id}/kill-sheet`).send(body).expect(400);
    expect((answer.body as Problem).fields).toHaveProperty('killDay');
  });

  test('by two owners at once keeps the first and tells the second', async () => {
    const { carcase } = await aCarcase();
    await owner.put(`/api/carcases/${carcase.id}/kill-sheet`).send(sheet()).expect(200);
    const answer = await owner
      .put(`/api/carcases/${carcase.id}/kill-sheet`)
      .send(sheet({ grams: 300_000 }))
      .expect(409);
    expect(answer.body).toMatchObject({ code: 'STATE_CHANGED', figures: { yourVersion: 1, presentVersion: 2 } });
    expect((await owner.get(`/api/carcases/${carcase.id}`).expect(200)).body).toMatchObject({ hotGrams: 356_200 });
  });

  test('of a beast over thirty months closes the ways that keep vertebral column, a day before it does not', async () => {
    const killDay = addDays(today(), -2);
    const old = await aCarcase({}, { born: addDays(addMonths(killDay, -30), -1) });
    const young = await aCarcase({}, { born: addMonths(killDay, -30) });
    const oldBody = (await owner.put(`/api/carcases/${old.carcase.id}/kill-sheet`).send(sheet()).expect(200))
      .body as Carcase;
    const youngBody = (await owner.put(`/api/carcases/${young.carcase.id}/kill-sheet`).send(sheet()).expect(200))
      .body as Carcase;
    expect(oldBody).toMatchObject({ isOverThirtyMonths: true, ageMonths: 30 });
    expect(oldBody.closedWays.map((closed) => closed.way).join()).toMatch(/T-bone/i);
    expect(youngBody).toMatchObject({ isOverThirtyMonths: false, closedWays: [], ageMonths: 30 });
  });
});

describe('weights from the block', () => {
  let id: string;
  let before: Carcase;
  beforeEach(async () => {
    const { carcase } = await aCarcase();
    id = carcase.id;
    before = (await owner.put(`/api/carcases/${id}/kill-sheet`).send(sheet()).expect(200)).body as Carcase;
  });

  const enter = (weights: { path: string; grams: number | null }[], version = 2) =>
    owner.put(`/api/carcases/${id}/weights`).send({ version, weights });
  const grams = (carcase: Carcase, path: string) => carcase.nodes.find((node) => node.path === path)?.grams ?? 0;

  test('of one primal replace its estimate, rescale the rest and conserve every gram', async () => {
    const path = 'left/fore/brisket';
    const measured = grams(before, path) + 700;
    const body = (await enter([{ path, grams: measured }]).expect(200)).body as Carcase;
    const node = body.nodes.find((candidate) => candidate.path === path);
    expect(node).toMatchObject({ grams: measured, source: 'weighed', estimatedGrams: grams(before, path) });
    expectMassConserved(body.nodes);
  });

  test('can be taken back', async () => {
    const path = 'left/fore/brisket';
    await enter([{ path, grams: grams(before, path) + 700 }]).expect(200);
    const body = (await enter([{ path, grams: null }], 3).expect(200)).body as Carcase;
    expect(grams(body, path)).toBe(grams(before, path));
  });

  test('that differ from their whole by more than half a per cent are refused with both figures; nothing is kept', async () => {
    const left = grams(before, 'left');
    const weights = [
      { path: 'left', grams: left },
      { path: 'left/fore', grams: Math.round(left * 0.55) },
      { path: 'left/hind', grams: Math.round(left * 0.5) },
    ];
    const answer = await enter(weights).expect(422);
    const problem = answer.body as Problem;
    expect(problem.code).toBe('MEASURED_EXCEEDS_PARENT');
    expect(problem.figures).toMatchObject({ parentGrams: left });
    expect((await owner.get(`/api/carcases/${id}`).expect(200)).body).toEqual(before);
  });

  test('of a part that the carcase does not have, or named twice, are refused beside the row', async () => {
    const unknown = await enter([{ path: 'left/fore/wing', grams: 1000 }]).expect(400);
    expect((unknown.body as Problem).fields).toHaveProperty('weights.0.path');
    const twice = [
      { path: 'left', grams: 170_000 },
      { path: 'left', grams: 171_000 },
    ];
    const answer = await enter(twice).expect(400);
    expect((answer.body as Problem).fields).toEqual({ 'weights.1.path': expect.stringContaining('twice') as string });
  });

  test('of a carcase that is not killed yet are refused', async () => {
    const { carcase } = await aCarcase();
    const body = { version: 1, weights: [{ path: 'left', grams: 160_000 }] };
    const answer = await owner.put(`/api/carcases/${carcase.id}/weights`).send(body).expect(409);
    expect((answer.body as Problem).detail).toContain('kill sheet');
  });

  test('are the owner’s to enter', async () => {
    const packer = world.request((await world.signIn('packer')).cookie);
    const body = { version: 2, weights: [{ path: 'left', grams: 170_000 }] };
    await packer.put(`/api/carcases/${id}/weights`).send(body).expect(403);
    await packer.get(`/api/carcases/${id}`).expect(403);
    await world.request().put(`/api/carcases/${id}/weights`).send(body).expect(401);
  });
});
