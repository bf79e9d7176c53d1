import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { traditionalSide } from '#shared/engine/figures/traditional-side.ts';
import type { Specification } from '#shared/engine/figures/specification.ts';
import type { Problem } from '#shared/errors.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { makeFarm } from '#tests/support/make-farm.ts';
import { makeTraditionalSide } from '#tests/support/make-specification.ts';

let world: World;
let owner: ReturnType<World['request']>;

beforeAll(async () => {
  world = await startWorld();
  await makeFarm(world.db);
  await makeTraditionalSide(world.db);
  owner = world.request((await world.signIn('owner')).cookie);
});
afterAll(() => world.stop());

type Summary = { id: string; name: string; edition: number };
const list = async () =>
  ((await owner.get('/api/specifications').expect(200)).body as { specifications: Summary[] }).specifications;
const save = (body: unknown, basedOnEdition: number, name = traditionalSide.name) =>
  owner.post('/api/specifications').send({ name, basedOnEdition, body });

/** The first primal, and so its quarter, with `more` parts of meat: the side no longer adds up to the whole. */
function withMeat(more: number): Specification {
  const copy = structuredClone(traditionalSide);
  const primal = copy.quarters[0].primals[0];
  if (primal) primal.tissues.meat += more;
  copy.quarters[0].sharePpht += more;
  return copy;
}

describe('a cutting specification', () => {
  test('is saved as a new edition beside the old one', async () => {
    const [first] = await list();
    const changed = { ...traditionalSide, source: 'Our own block test.' };
    const answer = await save(changed, 1).expect(200);
    expect(answer.body).toMatchObject({ name: traditionalSide.name, edition: 2 });
    const { id } = answer.body as Summary;
    const stored = await owner.get(`/api/specifications/${id}`).expect(200);
    expect((stored.body as { body: Specification }).body).toEqual(changed);
    const old = await owner.get(`/api/specifications/${first?.id}`).expect(200);
    expect((old.body as { body: Specification }).body.source).toBe(traditionalSide.source);
  });

  test('based on an older edition is refused: somebody else has saved one since', async () => {
    const before = await list();
    const answer = await save(traditionalSide, 1).expect(409);
    expect(answer.body).toMatchObject({ code: 'STATE_CHANGED', figures: { yourEdition: 1, presentEdition: 2 } });
    expect(await list()).toEqual(before);
  });

  test.each([
    ['more', 17],
    ['less', -17],
  ])('that adds up to %s than 100 per cent is refused with both sums', async (_name, more) => {
    const before = await list();
    const answer = await save(withMeat(more), 0, 'A slip').expect(422);
    const problem = answer.body as Problem;
    expect(problem.code).toBe('SPEC_NOT_100');
    expect(problem.figures).toMatchObject({ sumPpht: 100_000 + more, expectedPpht: 100_000 });
    expect(await list()).toEqual(before);
  });

  test('of the wrong shape is refused beside the part that is wrong', async () => {
    const answer = await save({ ...traditionalSide, choices: [] }, 0, 'A slip').expect(400);
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
