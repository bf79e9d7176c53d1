import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { auditEntry } from '#db/schema/audit.ts';
import { cut } from '#db/schema/products.ts';
import type { Carcase, CuttingDay } from '#shared/contracts/carcases.ts';
import type { SpecificationEdition } from '#shared/contracts/specifications.ts';
import { addDays } from '#shared/domain/day.ts';
import { seamSide } from '#shared/engine/figures/seam-side.ts';
import { traditionalSide } from '#shared/engine/figures/traditional-side.ts';
import type { Specification } from '#shared/engine/figures/specification.ts';
import type { Problem } from '#shared/errors.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { makeAnimal, makeCarcase, makeCuttingDay, makeFarm } from '#tests/support/make-farm.ts';
import { makeTraditionalSide } from '#tests/support/make-specification.ts';

let world: World;
let owner: ReturnType<World['request']>;
let daysMade = 0;

beforeAll(async () => {
  world = await startWorld();
  await makeFarm(world.db);
  await makeTraditionalSide(world.db);
  owner = world.request((await world.signIn('owner')).cookie);
});
afterAll(() => world.stop());

const list = async () =>
  ((await owner.get('/api/specifications').expect(200)).body as { specifications: SpecificationEdition[] })
    .specifications;
const read = async (id: string) =>
  (await owner.get(`/api/specifications/${id}`).expect(200)).body as SpecificationEdition & {
    latestEdition: number;
    body: Specification;
  };
const save = (body: unknown, basedOnEdition: number, name = traditionalSide.name) =>
  owner.post('/api/specifications').send({ name, basedOnEdition, body });
const copy = async (name: string, fromId = traditionalSide.id) =>
  (await owner.post('/api/specifications/copies').send({ name, fromId }).expect(200)).body as SpecificationEdition;
const aDay = (specificationId: string, state: 'planned' | 'open' | 'closed' = 'planned') =>
  makeCuttingDay(world.db, world.clock.today(), {
    day: addDays(world.clock.today(), 20 + (daysMade += 1)),
    specificationId,
    state,
  });

/** The first primal, and so its quarter, with `more` parts of meat: the side no longer adds up to the whole. */
function withMeat(more: number): Specification {
  const changed = structuredClone(traditionalSide);
  const primal = changed.quarters[0].primals[0];
  if (primal) primal.tissues.meat += more;
  changed.quarters[0].sharePpht += more;
  return changed;
}

/** Meat moved from the second primal to the first: another specification that adds up. */
function withMeatMoved(parts: number, from: Specification = traditionalSide): Specification {
  const changed = structuredClone(from);
  const [first, second] = changed.quarters[0].primals;
  if (!first || !second) throw new Error('the specification has changed');
  first.tissues.meat += parts;
  second.tissues.meat -= parts;
  return changed;
}

describe('a cutting specification', () => {
  test('is saved as a new edition beside the old one', async () => {
    const [first] = await list();
    const changed = { ...traditionalSide, source: 'Our own block test.' };
    const answer = await save(changed, 1).expect(200);
    expect(answer.body).toMatchObject({ name: traditionalSide.name, edition: 2, origin: 'written', isRetired: false });
    const stored = await read((answer.body as SpecificationEdition).id);
    expect(stored).toMatchObject({ body: changed, shippedId: 'traditional-side', latestEdition: 2 });
    expect((await read(first?.id ?? '')).body.source).toBe(traditionalSide.source);
  });

  test('based on an older edition is refused: somebody else has saved one since', async () => {
    const before = await list();
    const answer = await save(traditionalSide, 1).expect(409);
    expect(answer.body).toMatchObject({ code: 'STATE_CHANGED', figures: { yourEdition: 1, presentEdition: 2 } });
    expect(await list()).toEqual(before);
  });

  test('saved by two owners at once from the same edition, is written by one of them alone', async () => {
    const { name } = await copy('Two owners');
    const answers = await Promise.all([1, 2, 3, 4].map((parts) => save(withMeatMoved(parts), 1, name)));
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409, 409, 409]);
    expect((await list()).filter((one) => one.name === name).map(({ edition }) => edition)).toEqual([2, 1]);
  });

  test.each([
    ['more', 17],
    ['less', -17],
  ])('that adds up to %s than 100 per cent is refused with both sums', async (_name, more) => {
    const before = await list();
    const answer = await save(withMeat(more), 2).expect(422);
    const problem = answer.body as Problem;
    expect(problem.code).toBe('SPEC_NOT_100');
    expect(problem.figures).toMatchObject({ sumPpht: 100_000 + more, expectedPpht: 100_000 });
    expect(await list()).toEqual(before);
  });

  test('of the wrong shape is refused beside the part that is wrong', async () => {
    const answer = await save({ ...traditionalSide, choices: [] }, 2).expect(400);
    expect((answer.body as Problem).fields).toHaveProperty(['body.choices']);
  });

  test('is the owner’s alone', async () => {
    await world.request().get('/api/specifications').expect(401);
    const packer = world.request((await world.signIn('packer')).cookie);
    await packer.get('/api/specifications').expect(403);
    await packer.get('/api/collection-points').expect(403);
    await owner.get('/api/collection-points').expect(200);
  });
});

describe('a copy', () => {
  test('of a shipped specification, has the farm’s own name and brings the cuts that the farm has not had', async () => {
    const made = await copy('Our seam side', seamSide.id);
    expect(made).toMatchObject({ name: 'Our seam side', edition: 1, origin: 'copied', shippedId: 'seam-side' });
    expect((await read(made.id)).body).toEqual({ ...seamSide, name: 'Our seam side' });
    const ids = (await world.db.select({ id: cut.id }).from(cut)).map(({ id }) => id);
    expect(ids).toEqual(expect.arrayContaining(seamSide.cuts.map(({ id }) => id)));
  });

  test('of an edition, starts from what that edition says', async () => {
    const first = await copy('The first of two');
    const changed = withMeatMoved(40);
    const second = (await save(changed, 1, first.name).expect(200)).body as SpecificationEdition;
    const made = await copy('The second of two', second.id);
    expect((await read(made.id)).body.quarters).toEqual(changed.quarters);
  });

  test.each([
    ['a name that is taken', { name: traditionalSide.name, fromId: 'cow-side' }, 409],
    ['no name', { name: ' ', fromId: 'cow-side' }, 400],
    ['a specification that is not there', { name: 'Of nothing', fromId: 'no-such-side' }, 404],
  ])('with %s, is refused and nothing is written', async (_name, body, status) => {
    const before = await list();
    await owner.post('/api/specifications/copies').send(body).expect(status);
    expect(await list()).toEqual(before);
  });

  test('brought back to the shipped figures, has them as a new edition and keeps its name', async () => {
    const first = await copy('Brought back');
    const second = (await save(withMeatMoved(99), 1, first.name).expect(200)).body as SpecificationEdition;
    const at = `/api/specifications/${second.id}/restore`;
    await owner.post(at).send({ basedOnEdition: 1 }).expect(409);
    const third = (await owner.post(at).send({ basedOnEdition: 2 }).expect(200)).body as SpecificationEdition;
    expect(third).toMatchObject({ name: first.name, edition: 3, origin: 'restored' });
    expect((await read(third.id)).body).toEqual({ ...traditionalSide, name: first.name });
    expect((await read(second.id)).body.quarters).toEqual(withMeatMoved(99).quarters);
  });
});

describe('a retired specification', () => {
  test('is offered for no new day and takes no new edition, until it is brought back', async () => {
    const made = await copy('Retired');
    const used = await aDay(made.id);
    const at = `/api/specifications/${made.id}/retirement`;
    for (const _time of ['once', 'again']) {
      const answer = await owner.put(at).send({ isRetired: true }).expect(200);
      expect(answer.body).toMatchObject({ isRetired: true, days: [{ id: used.id }] });
    }
    const notes = await world.db.select().from(auditEntry).where(eq(auditEntry.subjectId, made.id));
    expect(notes.filter(({ action }) => action === 'retired')).toHaveLength(1);

    const wanted = {
      day: addDays(world.clock.today(), 90),
      cutOffDay: addDays(world.clock.today(), 88),
      cutOffTime: '18:00',
      specificationId: made.id,
      collections: [],
    };
    const refused = (await owner.post('/api/cutting-days').send(wanted).expect(400)).body as Problem;
    expect(refused.fields).toEqual({ specificationId: 'This cutting specification is retired.' });
    await save(traditionalSide, 1, made.name).expect(409);
    await owner.get(`/api/cutting-days/${used.id}`).expect(200);

    await owner.put(at).send({ isRetired: false }).expect(200);
    await owner.post('/api/cutting-days').send(wanted).expect(200);
  });
});

describe('the specification of a cutting day', () => {
  const aCarcase = async (dayId: string) =>
    makeCarcase(world.db, dayId, {
      animalId: (await makeAnimal(world.db, { born: addDays(world.clock.today(), -26 * 30) })).id,
      killDay: addDays(world.clock.today(), -2),
      coldGrams: 338_000,
      state: 'hanging',
    });
  const gramsOf = async (carcaseId: string) => {
    const { nodes } = (await owner.get(`/api/carcases/${carcaseId}`).expect(200)).body as Carcase;
    return nodes.map(({ path, grams }) => `${path} ${grams}`);
  };

  test('is the edition that it was planned with, whatever is edited afterwards', async () => {
    const made = await copy('Before the edit');
    const day = await aDay(made.id);
    const carcase = await aCarcase(day.id);
    const before = await gramsOf(carcase.id);
    await save(withMeatMoved(900), 1, made.name).expect(200);
    expect(await gramsOf(carcase.id)).toEqual(before);
    expect((await owner.get(`/api/cutting-days/${day.id}`)).body).toMatchObject({
      specificationId: made.id,
      specificationName: 'Before the edit, edition 1',
      figuresVersion: 1,
    });
  });

  test('is chosen anew before the sale: its figures are a new version and other grams', async () => {
    const made = await copy('Chosen first');
    const day = await aDay(made.id);
    const carcase = await aCarcase(day.id);
    const before = await gramsOf(carcase.id);
    const next = (await save(withMeatMoved(900), 1, made.name).expect(200)).body as SpecificationEdition;
    const at = `/api/cutting-days/${day.id}/specification`;
    const answer = await owner.put(at).send({ version: 1, specificationId: next.id }).expect(200);
    expect(answer.body as CuttingDay).toMatchObject({ specificationId: next.id, figuresVersion: 2, version: 2 });
    expect(await gramsOf(carcase.id)).not.toEqual(before);
    const late = await owner.put(at).send({ version: 1, specificationId: made.id }).expect(409);
    expect(late.body).toMatchObject({ code: 'STATE_CHANGED', figures: { yourVersion: 1, presentVersion: 2 } });
  });

  test('stays once the day is on sale or closed', async () => {
    const made = await copy('On sale already');
    const other = await copy('Too late');
    for (const state of ['open', 'closed'] as const) {
      const day = await aDay(made.id, state);
      const at = `/api/cutting-days/${day.id}/specification`;
      await owner.put(at).send({ version: 1, specificationId: other.id }).expect(409);
      expect((await owner.get(`/api/cutting-days/${day.id}`)).body).toMatchObject({
        specificationId: made.id,
        figuresVersion: 1,
      });
    }
  });

  test('that does not foresee what was weighed already is refused, and nothing changes', async () => {
    const made = await copy('Weighed already');
    const other = await copy('Another cut', seamSide.id);
    const day = await aDay(made.id);
    const carcase = await aCarcase(day.id);
    const weights = [{ path: 'left/hind/topside/topside-joint', grams: 9_000 }];
    await owner.put(`/api/carcases/${carcase.id}/weights`).send({ version: 1, weights }).expect(200);
    const at = `/api/cutting-days/${day.id}/specification`;
    const answer = await owner.put(at).send({ version: 1, specificationId: other.id }).expect(400);
    expect((answer.body as Problem).detail).toContain('Nothing was changed');
    expect((await owner.get(`/api/cutting-days/${day.id}`)).body).toMatchObject({ specificationId: made.id });
  });

  test('is a packer’s to see and not to choose', async () => {
    const made = await copy('Not for packers');
    const day = await aDay(made.id);
    const packer = world.request((await world.signIn('packer')).cookie);
    const body = { version: 1, specificationId: made.id };
    await packer.put(`/api/cutting-days/${day.id}/specification`).send(body).expect(403);
    await world.request().put(`/api/cutting-days/${day.id}/specification`).send(body).expect(401);
  });
});
