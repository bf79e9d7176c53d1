import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { cuttingDay } from '#db/schema/carcases.ts';
import type { Carcase } from '#shared/contracts/carcases.ts';
import { addDays, addMonths } from '#shared/domain/day.ts';
import type { Problem } from '#shared/errors.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { makeAnimal, makeCarcase, makeCuttingDay, makeFarm } from '#tests/support/make-farm.ts';
import { makeTraditionalSide } from '#tests/support/make-specification.ts';

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

async function aCarcase(more: Parameters<typeof makeCarcase>[2] = {}) {
  const today = world.clock.today();
  const day = await makeCuttingDay(world.db, today, { day: addDays(today, 20 + (daysMade += 1)), specificationId });
  const animal = await makeAnimal(world.db, { born: addMonths(today, -26) });
  const carcase = await makeCarcase(world.db, day.id, {
    animalId: animal.id,
    killDay: addDays(today, -2),
    state: 'hanging',
    ...more,
  });
  return { id: carcase.id, dayId: day.id };
}

const enterSheet = (id: string, more: object) =>
  owner.put(`/api/carcases/${id}/kill-sheet`).send({
    version: 1,
    killDay: addDays(world.clock.today(), -2),
    weighedAs: 'hot',
    grams: 340_000,
    conformation: 'R',
    fatClass: '4L',
    dressingSpec: null,
    ...more,
  });
const weigh = (id: string, weights: { path: string; grams: number | null }[], version = 1) =>
  owner.put(`/api/carcases/${id}/weights`).send({ version, weights });
const gramsAt = (carcase: Carcase, path: string) => carcase.nodes.find((node) => node.path === path)?.grams ?? 0;
const readCarcase = async (id: string) => (await owner.get(`/api/carcases/${id}`).expect(200)).body as Carcase;

describe('a kill sheet with each side’s own weight', () => {
  test('parts the hung carcase as the sides were weighed, and every part of a side by its side', async () => {
    const { id } = await aCarcase();
    const answer = await enterSheet(id, { leftGrams: 172_000, rightGrams: 168_000 }).expect(200);
    const carcase = answer.body as Carcase;
    expect(carcase).toMatchObject({ leftGrams: 172_000, rightGrams: 168_000, isGraded: true, hungSource: 'estimated' });
    const [left, right] = [gramsAt(carcase, 'left'), gramsAt(carcase, 'right')];
    expect(left + right).toBe(carcase.hungGrams);
    expect(Math.abs(left / right - 172 / 168)).toBeLessThan(0.0001);
    const primal = 'hind/topside';
    expect(gramsAt(carcase, `left/${primal}`)).toBeGreaterThan(gramsAt(carcase, `right/${primal}`));
  });

  test('gives way to what a side weighs on the hook, which then is never overwritten', async () => {
    const { id } = await aCarcase();
    await enterSheet(id, { leftGrams: 172_000, rightGrams: 168_000 }).expect(200);
    await weigh(id, [{ path: 'left', grams: 166_000 }], 2).expect(200);
    await enterSheet(id, { version: 3, leftGrams: 171_000, rightGrams: 169_000 }).expect(200);
    const carcase = await readCarcase(id);
    expect(carcase.nodes.find(({ path }) => path === 'left')).toMatchObject({ grams: 166_000, source: 'weighed' });
  });

  test.each([
    ['one side alone', { leftGrams: 170_000 }, { status: 400, field: 'rightGrams' }],
    ['a side of 10 kg', { leftGrams: 330_000, rightGrams: 10_000 }, { status: 400, field: 'rightGrams' }],
    ['sides 0.6 % off the whole', { leftGrams: 171_000, rightGrams: 171_040 }, { status: 422, field: 'grams' }],
  ])('with %s, is refused beside the field and nothing is kept', async (_name, sides, { status, field }) => {
    const { id } = await aCarcase();
    const problem = (await enterSheet(id, sides).expect(status)).body as Problem;
    expect(Object.keys(problem.fields ?? {})).toEqual([field]);
    expect(await readCarcase(id)).toMatchObject({ version: 1, hotGrams: null, leftGrams: null });
  });

  test('with sides 0.5 % off the whole, is accepted', async () => {
    const { id } = await aCarcase();
    await enterSheet(id, { leftGrams: 170_700, rightGrams: 171_000 }).expect(200);
  });
});

describe('weights at every level', () => {
  test('of a live beast before its kill day, move the estimate and the figures of its day', async () => {
    const { id, dayId } = await aCarcase({ state: 'booked', killDay: addDays(world.clock.today(), 3) });
    const before = await readCarcase(id);
    const after = (await weigh(id, [{ path: 'live', grams: 640_000 }]).expect(200)).body as Carcase;
    expect(after).toMatchObject({ liveGrams: 640_000, version: 2, coldSource: 'estimated' });
    expect(after.coldGrams).toBeGreaterThan(before.coldGrams);
    const [day] = await world.db.select().from(cuttingDay).where(eq(cuttingDay.id, dayId));
    expect(day?.figuresVersion).toBe(2);
  });

  test.each([
    ['a part', [{ path: 'left', grams: 160_000 }], 409],
    ['a live weight of 1.6 t', [{ path: 'live', grams: 1_500_001 }], 400],
    ['a live weight of 90 kg', [{ path: 'live', grams: 90_000 }], 400],
    ['a live weight taken back', [{ path: 'live', grams: null }], 400],
  ])('before its kill day, %s is refused', async (_name, weights, status) => {
    const { id } = await aCarcase({ state: 'booked', killDay: addDays(world.clock.today(), 3) });
    await weigh(id, weights).expect(status);
    expect(await readCarcase(id)).toMatchObject({ liveGrams: 620_000, version: 1 });
  });

  test('after the kill sheet, a live weight counts no more', async () => {
    const { id } = await aCarcase({ coldGrams: 333_000 });
    await weigh(id, [{ path: 'live', grams: 640_000 }]).expect(409);
  });

  test('of a heavy carcase as it hangs, are accepted above what any side weighs', async () => {
    const { id } = await aCarcase({ coldGrams: 420_000 });
    const carcase = (await weigh(id, [{ path: 'hung', grams: 415_000 }]).expect(200)).body as Carcase;
    expect(carcase).toMatchObject({ hungGrams: 415_000, hungSource: 'weighed' });
    const problem = (await weigh(id, [{ path: 'left', grams: 400_000 }], 2).expect(400)).body as Problem;
    expect(problem.fields).toEqual({ 'weights.0.grams': 'This weighs between 0 kg and 360 kg.' });
  });

  test('of side, quarter, primal and cut on one side, leave the other side as it was foreseen', async () => {
    const { id } = await aCarcase({ coldGrams: 338_000, conformation: 'R', fatClass: '4L' });
    const before = await readCarcase(id);
    const at = (path: string) => Math.round(gramsAt(before, path) * 1.002);
    const paths = ['left/fore', 'left/fore/brisket', 'left/hind/topside/topside-joint'];
    const hung = { path: 'hung', grams: before.hungGrams };
    const side = { path: 'left', grams: gramsAt(before, 'left') };
    const right = { path: 'right', grams: gramsAt(before, 'right') };
    const weights = [hung, side, right, ...paths.map((path) => ({ path, grams: at(path) }))];
    const after = (await weigh(id, weights).expect(200)).body as Carcase;
    for (const path of paths) expect(gramsAt(after, path)).toBe(at(path));
    const ofRight = ({ path }: { path: string }) => path.startsWith('right');
    expect(after.nodes.filter(ofRight).map(({ grams }) => grams)).toEqual(
      before.nodes.filter(ofRight).map(({ grams }) => grams),
    );
  });
});
