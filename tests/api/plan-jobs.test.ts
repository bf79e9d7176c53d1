import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { allocation } from '#db/schema/allocations.ts';
import { cut } from '#db/schema/products.ts';
import { cuttingDay } from '#db/schema/carcases.ts';
import type { PlanJob, WhatIf } from '#shared/contracts/plan-jobs.ts';
import type { SolveOptions } from '#shared/engine/linear/solve.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { makeSellingDay } from '#tests/support/make-selling-day.ts';
import { awaitPlanJob } from '#tests/support/work-out.ts';

/** A day is solved for real here, on a machine that may be busy. */
const PATIENCE = 180_000;
const NOTHING: WhatIf = { boxes: [], cuts: [], hangingDays: null, moreCarcases: 0 };

let world: World;
let farm: Awaited<ReturnType<typeof makeSellingDay>>;
let owner: ReturnType<World['request']>;

beforeAll(async () => {
  world = await startWorld();
  farm = await makeSellingDay(world.db, world.clock);
  owner = world.request((await world.signIn('owner')).cookie);
});
afterAll(() => world.stop());

const countPlans = () => world.db.$count(allocation);

async function start(what: 'plan-jobs' | 'what-if-jobs', more: object = {}): Promise<string> {
  const body = { locks: [], timeLimitSeconds: 120, ...more };
  const answer = await owner.post(`/api/cutting-days/${farm.day.id}/${what}`).send(body).expect(200);
  return (answer.body as { jobId: string }).jobId;
}

async function suppose(whatIf: Partial<WhatIf>): Promise<PlanJob> {
  return awaitPlanJob(owner, await start('what-if-jobs', { whatIf: { ...NOTHING, ...whatIf } }));
}

/** A solver that never answers, tells how it was asked, and ends as the real one does when it is cancelled. */
function stallSolver() {
  const real = world.deps.solver;
  const asked: SolveOptions[] = [];
  world.deps.solver = {
    ...real,
    solve: (_lpText, options = {}) => {
      asked.push(options);
      options.onProgress?.({ milliseconds: 1_250, nodes: 7, best: 100_000, bound: 110_000 });
      return new Promise((_resolve, reject) => {
        options.signal?.addEventListener('abort', () => reject(options.signal?.reason as Error));
      });
    },
  };
  return { asked, restore: () => (world.deps.solver = real) };
}

describe('working a plan out', () => {
  test('while it runs, tells phase, best so far, gap and time, and a cancel ends it with nothing kept', async () => {
    const stalled = stallSolver();
    const before = await countPlans();
    const jobId = await start('plan-jobs', { timeLimitSeconds: 45 });
    const seen = (await owner.get(`/api/plan-jobs/${jobId}`).expect(200)).body as PlanJob;
    const progress = { phase: 'contribution', milliseconds: 1_250, bestPence: 100_000, gapBasisPoints: 1_000 };
    expect(seen).toMatchObject({ state: 'working', progress, allocation: null, problem: null });
    expect(stalled.asked[0]?.timeLimitSeconds).toBe(45);
    const cancelled = (await owner.post(`/api/plan-jobs/${jobId}/cancel`).send({}).expect(200)).body as PlanJob;
    expect(cancelled).toMatchObject({ id: jobId, state: 'cancelled', allocation: null });
    expect(await countPlans()).toBe(before);
    stalled.restore();
  });

  test(
    'once it ends, is a draft; cancelling it then changes nothing',
    async () => {
      const before = await countPlans();
      const jobId = await start('plan-jobs');
      const done = await awaitPlanJob(owner, jobId);
      expect(done).toMatchObject({ state: 'done', allocation: { state: 'draft', dayId: farm.day.id } });
      const again = (await owner.post(`/api/plan-jobs/${jobId}/cancel`).send({}).expect(200)).body as PlanJob;
      expect(again).toMatchObject({ state: 'done', allocation: { id: done.allocation?.id } });
      expect(await countPlans()).toBe(before + 1);
    },
    PATIENCE,
  );

  test('with a lock on a way that this side lacks, says why it failed', async () => {
    const place = { carcaseId: farm.carcases[0]?.id ?? '', side: 'left', choiceId: 'brisket' };
    const failed = await awaitPlanJob(owner, await start('plan-jobs', { locks: [{ ...place, wayId: 'no-such-way' }] }));
    expect(failed).toMatchObject({ state: 'failed', allocation: null });
    expect(failed.problem).toContain('A lock names a way of Brisket');
  });

  test('without time, of a closed day or under an unknown number, is refused', async () => {
    const at = `/api/cutting-days/${farm.day.id}/plan-jobs`;
    await owner.post(at).send({ locks: [], timeLimitSeconds: 0 }).expect(400);
    await owner.get('/api/plan-jobs/00000000-0000-4000-8000-000000000000').expect(404);
    await world.db.update(cuttingDay).set({ state: 'closed' }).where(eq(cuttingDay.id, farm.day.id));
    const closed = await owner.post(at).send({ locks: [], timeLimitSeconds: 10 });
    expect(closed.body).toMatchObject({ code: 'STATE_CHANGED' });
    await world.db.update(cuttingDay).set({ state: 'planned' }).where(eq(cuttingDay.id, farm.day.id));
  });
});

describe('what if', () => {
  test(
    'a box cost more, brings the higher contribution beside the one as it is, and keeps nothing',
    async () => {
      const before = await countPlans();
      const boxes = [{ boxKindId: farm.grillId, pricePence: 9_900, demandBoxes: 12 }];
      const { state, outcomes } = await suppose({ boxes });
      expect(state).toBe('done');
      expect(outcomes?.after.contributionPence).toBeGreaterThan(outcomes?.before.contributionPence ?? Infinity);
      expect(outcomes?.after.coldGrams).toBe(outcomes?.before.coldGrams);
      expect(outcomes?.after).toMatchObject({ isProven: true, shortfalls: [] });
      expect(await countPlans()).toBe(before);
    },
    PATIENCE,
  );

  test(
    'there were one carcase more and nobody bought brisket, has more beef and no brisket packs',
    async () => {
      const cuts = [{ cutId: 'brisket-joint', tenthPencePerKg: 0, looseDemandPacks: 0 }];
      const { outcomes } = await suppose({ moreCarcases: 1, cuts });
      expect([outcomes?.before.carcases, outcomes?.after.carcases]).toEqual([2, 3]);
      expect(outcomes?.after.deadweightPence).toBeGreaterThan(outcomes?.before.deadweightPence ?? Infinity);
      const brisket = outcomes?.after.cuts.find(({ id }) => id === 'brisket-joint');
      expect(brisket?.loosePacks ?? 0).toBe(0);
      const rows = await world.db.select().from(cut).where(eq(cut.id, 'brisket-joint'));
      expect(rows[0]?.looseDemandPacks).toBe(6);
    },
    PATIENCE,
  );

  test(
    'the sides hung twice as long, loses weight on the hook and not in the deadweight value',
    async () => {
      const { outcomes } = await suppose({ hangingDays: 28 });
      expect(outcomes?.after.hungGrams).toBeLessThan(outcomes?.before.hungGrams ?? 0);
      expect(outcomes?.after.deadweightPence).toBe(outcomes?.before.deadweightPence);
    },
    PATIENCE,
  );

  test('no carcase were left, says so', async () => {
    expect(await suppose({ moreCarcases: -2 })).toMatchObject({
      state: 'failed',
      problem: 'A day needs at least one carcase. Nothing was worked out.',
    });
  });
});
