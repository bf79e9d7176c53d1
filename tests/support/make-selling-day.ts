import { boxKind, boxLine, boxLineCut, cut } from '#db/schema/products.ts';
import { tradeAccount, tradePrice } from '#db/schema/trade.ts';
import type { Db } from '#db/client.ts';
import type { Clock } from '#server/deps.ts';
import { traditionalSide } from '#shared/engine/figures/traditional-side.ts';
import { addDays } from '#shared/domain/day.ts';
import { makeAnimal, makeCarcase, makeCuttingDay, makeFarm, makeSlot, makeSpecification } from './make-farm.ts';

type Line = { name: string; grams: [number, number]; packs: [number, number | null]; cutIds: string[] };

const EVERYDAY: Line[] = [
  { name: 'Mince', grams: [1_200, 2_200], packs: [3, 4], cutIds: ['mince'] },
  {
    name: 'For the stew',
    grams: [800, 2_200],
    packs: [2, 4],
    cutIds: ['braising-steak', 'diced-beef', 'feather-steak'],
  },
  {
    name: 'A joint',
    grams: [900, 2_000],
    packs: [1, 1],
    cutIds: ['topside-joint', 'silverside-joint', 'top-rump-joint'],
  },
];
const GRILL: Line[] = [
  { name: 'Steaks', grams: [1_600, 2_600], packs: [4, 6], cutIds: ['sirloin-steak', 'rib-eye-steak', 'rump-steak'] },
  { name: 'Mince', grams: [800, 1_650], packs: [2, 3], cutIds: ['mince'] },
];

/** All cuts of the traditional side, on the farm's own table. */
export async function makeCutsOfTheSide(db: Db): Promise<void> {
  await db.insert(cut).values(
    traditionalSide.cuts.map((each) => ({
      id: each.id,
      name: each.name,
      description: each.description,
      cooking: each.cooking,
      tenthPencePerKg: each.tenthPencePerKg,
      clearanceTenthPencePerKg: each.clearanceTenthPencePerKg,
      minPackGrams: each.minPackGrams,
      maxPackGrams: each.maxPackGrams,
      looseDemandPacks: each.isSoldLoose ? 6 : 0,
      isSoldLoose: each.isSoldLoose,
      isFarmMinced: each.mayBeMinced,
      useByDays: each.useByDays,
    })),
  );
}

async function makeRecipe(db: Db, kind: typeof boxKind.$inferInsert, lines: readonly Line[]): Promise<string> {
  const [added] = await db.insert(boxKind).values(kind).returning({ id: boxKind.id });
  const boxKindId = added?.id ?? '';
  for (const [position, line] of lines.entries()) {
    const [minGrams, maxGrams] = line.grams;
    const [minPacks, maxPacks] = line.packs;
    const row = { boxKindId, position, name: line.name, minGrams, maxGrams, minPacks, maxPacks };
    const [made] = await db.insert(boxLine).values(row).returning({ id: boxLine.id });
    const boxLineId = made?.id ?? '';
    await db.insert(boxLineCut).values(line.cutIds.map((cutId) => ({ boxLineId, cutId })));
  }
  return boxKindId;
}

/** What a farm has before its first cutting day: its own table of cuts, two kinds of box and a specification. */
export async function makeShelves(db: Db) {
  await makeFarm(db);
  await makeCutsOfTheSide(db);
  const everydayId = await makeRecipe(
    db,
    {
      slug: 'everyday',
      name: 'Everyday',
      summary: 'A box for tests.',
      guaranteedGrams: 4_000,
      pricePence: 6_400,
      packagingPence: 290,
      demandBoxes: 24,
      position: 1,
    },
    EVERYDAY,
  );
  const grillId = await makeRecipe(
    db,
    {
      slug: 'grill',
      name: 'Grill',
      summary: 'A box for tests.',
      guaranteedGrams: 3_000,
      pricePence: 7_900,
      packagingPence: 290,
      demandBoxes: 12,
      position: 2,
    },
    GRILL,
  );
  const specification = await makeSpecification(db, { name: traditionalSide.name, body: traditionalSide });
  return { everydayId, grillId, specification };
}

/** A farm with a day of two weighed steers, two kinds of box and a slot: ready to be allocated, nothing on sale yet. */
export async function makeSellingDay(db: Db, clock: Clock, hotGramsOfEach: readonly number[] = [330_000, 318_000]) {
  const today = clock.today();
  const { everydayId, grillId, specification } = await makeShelves(db);
  const day = await makeCuttingDay(db, today, { specificationId: specification.id, state: 'planned' });
  const carcases = [];
  for (const hotGrams of hotGramsOfEach) {
    const animal = await makeAnimal(db, { born: addDays(today, -24 * 30) });
    const more = { animalId: animal.id, killDay: addDays(today, -5), liveGrams: 600_000, state: 'hanging' as const };
    carcases.push(await makeCarcase(db, day.id, { ...more, hotGrams, conformation: 'R', fatClass: '4L' }));
  }
  const slot = await makeSlot(db, day.id, today);
  return { day, carcases, everydayId, grillId, slot };
}

/** An approved trade account with prices for the hindquarter and for brisket. */
export async function makeTradeAccount(db: Db, userId: string, businessName = 'A butcher for tests'): Promise<string> {
  const row = { userId, businessName, addressLines: ['1 Test Street', 'ZZ2 2AA'], phone: '01632 960201' };
  const [account] = await db
    .insert(tradeAccount)
    .values({ ...row, state: 'approved' })
    .returning({ id: tradeAccount.id });
  const accountId = account?.id ?? '';
  await db.insert(tradePrice).values([
    { accountId, product: 'hind', tenthPencePerKg: 7_200 },
    { accountId, product: 'fore', tenthPencePerKg: 5_600 },
    { accountId, product: 'cut:brisket-joint', tenthPencePerKg: 9_400 },
  ]);
  return accountId;
}
