import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { carcase } from '#db/schema/carcases.ts';
import { animal } from '#db/schema/herd.ts';
import type { Settings } from '#shared/contracts/office.ts';
import { addDays } from '#shared/domain/day.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { makeSellingDay } from '#tests/support/make-selling-day.ts';
import { workOut } from '#tests/support/work-out.ts';

/** A day is solved for real here, on a machine that may be busy. */
const PATIENCE = 180_000;

let world: World;
let farm: Awaited<ReturnType<typeof makeSellingDay>>;
let owner: ReturnType<World['request']>;

beforeAll(async () => {
  world = await startWorld();
  farm = await makeSellingDay(world.db, world.clock, [330_000]);
  owner = world.request((await world.signIn('owner')).cookie);
});
afterAll(() => world.stop());

async function set(more: Partial<Settings>): Promise<Settings> {
  const now = (await owner.get('/api/settings').expect(200)).body as Settings;
  return (
    await owner
      .put('/api/settings')
      .send({ ...now, ...more })
      .expect(200)
  ).body as Settings;
}

describe('mincing meat that has hung', () => {
  test(
    'longer than the limit, is shown with the caution; once the premises close it, nothing is minced',
    async () => {
      // Killed five days ago and cut in nine: fourteen days from kill.
      const cautioned = await workOut(owner, farm.day.id);
      expect(cautioned.cautions.join()).toContain('14 days after kill, limit 6');
      expect(cautioned.cuts.reduce((sum, cut) => sum + cut.mincedGrams, 0)).toBeGreaterThan(0);
      await set({ minceAgeEffect: 'close' });
      const closed = await workOut(owner, farm.day.id);
      expect(closed.cautions.join()).toContain('closed for this day by your setting');
      expect(closed.cuts.every((cut) => cut.mincedGrams === 0)).toBe(true);
      await set({ minceAgeEffect: 'close', minceWithinDays: 14 });
      expect((await workOut(owner, farm.day.id)).cautions).toEqual([]);
    },
    PATIENCE,
  );

  test('with an effect or a limit that does not exist, is refused', async () => {
    const now = (await owner.get('/api/settings').expect(200)).body as Settings;
    await owner
      .put('/api/settings')
      .send({ ...now, minceAgeEffect: 'perhaps' })
      .expect(400);
    await owner
      .put('/api/settings')
      .send({ ...now, minceWithinDays: 0 })
      .expect(400);
  });
});

describe('a carcase over thirty months', () => {
  const closedWays = async () => {
    const plan = await workOut(owner, farm.day.id);
    return plan.sides.flatMap((side) =>
      side.choices.flatMap((choice) => choice.ways.filter((way) => way.closedReason)),
    );
  };

  test(
    'keeps its ways with vertebral column closed until the authorisation of the premises is recorded',
    async () => {
      const born = addDays(world.clock.today(), -5 - 31 * 31);
      await world.db
        .update(animal)
        .set({ born })
        .where(eq(animal.id, farm.carcases[0]?.animalId ?? ''));
      const closed = await closedWays();
      expect(closed.length).toBeGreaterThan(0);
      await set({ isVertebralColumnPremisesAuthorised: true });
      // In force from today on: the carcase was killed before.
      expect(await closedWays()).toHaveLength(closed.length);
      const killDay = world.clock.today();
      await world.db.update(carcase).set({ killDay }).where(eq(carcase.cuttingDayId, farm.day.id));
      expect(await closedWays()).toEqual([]);
    },
    PATIENCE,
  );
});
