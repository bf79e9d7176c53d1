import { allocation } from '#db/schema/allocations.ts';
import { addDays } from '#shared/domain/day.ts';
import type { World } from './harness.ts';
import { makeBoxOffer, makeLooseOffer } from './make-farm.ts';
import { asAnswer, makePlan } from './make-plan.ts';
import { makeSellingDay } from './make-selling-day.ts';

/** A selling day that is on sale, by a plan written by hand: ten grill boxes and eight packs of fillet. */
export async function makePublishedDay(world: World) {
  const { db, clock } = world;
  const farm = await makeSellingDay(db, clock);
  const { input, plan } = makePlan({
    carcaseIds: farm.carcases.map((carcase) => carcase.id),
    boxes: [
      { kindId: farm.grillId, boxes: 10, contents: { 'rump-steak': 1_000, 'sirloin-steak': 1_000, mince: 1_600 } },
      { kindId: farm.everydayId, boxes: 12, contents: { mince: 1_700, 'diced-beef': 1_000, 'topside-joint': 1_500 } },
    ],
    loose: { 'fillet-steak': { packs: 8, grams: 3_200 } },
    minced: { trim: 60_000, 'lean-trim': 10_000 },
  });
  await db.insert(allocation).values({
    cuttingDayId: farm.day.id,
    figuresVersion: farm.day.figuresVersion,
    locks: [],
    input: { input, lpText: '', spreads: {} },
    plan: asAnswer(plan),
    contributionPence: 0,
    isProven: true,
    state: 'published',
    publishedAt: clock.now(),
  });
  const grill = { id: farm.grillId, pricePence: 7_900, guaranteedGrams: 3_000 };
  const everyday = { id: farm.everydayId, pricePence: 6_400, guaranteedGrams: 4_000 };
  return {
    ...farm,
    grillOffer: await makeBoxOffer(db, farm.day.id, grill, 10),
    everydayOffer: await makeBoxOffer(db, farm.day.id, everyday, 12),
    filletOffer: await makeLooseOffer(db, farm.day.id, 'fillet-steak', {
      ...{ offered: 8, pricePence: 2_340, upperGrams: 450 },
    }),
    collectionDay: addDays(clock.today(), 10),
  };
}
