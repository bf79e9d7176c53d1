import { and, eq } from 'drizzle-orm';
import { offer } from '#db/schema/allocations.ts';
import { packAssignment, stockMovement } from '#db/schema/packs.ts';
import type { Pack, PackingDay } from '#shared/contracts/packs.ts';
import { listBalances } from '#server/carcases/ledger-queries.ts';
import type { World } from './harness.ts';
import { makeSellingDay } from './make-selling-day.ts';
import { publishByHand } from './publish-by-hand.ts';

export type PackingBench = Awaited<ReturnType<typeof makePackingDay>>;

/** Cuts of the everyday box: three packs of mince, two for the stew, one joint, at least 4 kg together. */
const EVERYDAY_CUTS = ['mince', 'braising-steak', 'diced-beef', 'feather-steak', 'topside-joint', 'silverside-joint'];

/** A day that is on sale, with what a packer does on it. The first of its two carcases gives every pack. */
export async function makePackingDay(world: World) {
  const farm = await makeSellingDay(world.db, world.clock);
  const owner = (await world.signIn('owner')).cookie;
  const packer = (await world.signIn('packer')).cookie;
  const dayId = farm.day.id;
  const carcaseId = farm.carcases[0]?.id ?? '';
  const path = `/api/cutting-days/${dayId}`;
  await publishByHand(world, dayId);
  const offers = await world.db.select().from(offer).where(eq(offer.cuttingDayId, dayId));
  const boxOffer = offers.find((each) => each.boxKindId === farm.everydayId);
  const looseOffer = offers.find(
    (each) => each.kind === 'loose' && each.offered > 3 && !EVERYDAY_CUTS.includes(each.cutId ?? 'mince'),
  );
  if (!boxOffer || !looseOffer) throw new Error('The plan offers no everyday box or no loose pack.');

  const send = async (url: string, body: object = {}) =>
    (await world.request(packer).post(url).send(body)).body as unknown;
  return {
    ...{ farm, owner, packer, dayId, carcaseId, boxOffer, looseOffer },
    day: farm.day,
    slot: farm.slot,
    looseCutId: looseOffer.cutId ?? '',
    read: async () => (await world.request(packer).get(`${path}/packing`)).body as PackingDay,
    /** Weighs packs in; the newest packs of the cut come back, lightest first. */
    weigh: async (cutId: string, grams: number[]): Promise<Pack[]> => {
      const known = new Set(
        ((await world.request(packer).get(`${path}/packing`)).body as PackingDay).packs.map((p) => p.id),
      );
      const day = (await send(`${path}/packs`, { carcaseId, cutId, grams })) as PackingDay;
      return day.packs.filter((pack) => !known.has(pack.id)).sort((a, b) => a.grams - b.grams);
    },
    fill: async () => (await send(`${path}/fill`)) as PackingDay,
    lose: async (packId: string, reason: string) => (await send(`/api/packs/${packId}/lose`, { reason })) as PackingDay,
    reweigh: async (packId: string, grams: number) =>
      (await world.request(packer).put(`/api/packs/${packId}/weight`).send({ grams })).body as Pack,
  };
}

/** Weighs in all that one everyday box takes: 4,300 g in six packs. */
export async function weighEverydayBox({ weigh }: Pick<PackingBench, 'weigh'>): Promise<Pack[]> {
  return [
    ...(await weigh('mince', [500, 500, 500])),
    ...(await weigh('diced-beef', [700, 700])),
    ...(await weigh('topside-joint', [1_400])),
  ];
}

/** Grams in and grams there of a carcase by the ledger: equal, or something has gone astray. */
export async function ledgerOf({ db }: World, carcaseId: string) {
  const rows = await db.select().from(stockMovement).where(eq(stockMovement.carcaseId, carcaseId));
  const balances = await listBalances(db, [carcaseId]);
  const at = (place: string) =>
    balances.filter((each) => each.place === place).reduce((sum, each) => sum + each.grams, 0);
  return {
    inGrams: rows.filter((row) => row.fromPlace === null).reduce((sum, row) => sum + row.grams, 0),
    thereGrams: balances.reduce((sum, each) => sum + each.grams, 0),
    isNegative: balances.some((each) => each.grams < 0),
    at,
  };
}

export function liveAssignments({ db }: World, packId: string) {
  return db
    .select()
    .from(packAssignment)
    .where(and(eq(packAssignment.packId, packId), eq(packAssignment.isLive, true)));
}
