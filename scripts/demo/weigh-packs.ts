import type { Chance } from '#db/seed/chance.ts';
import type { PackingDay } from '#shared/contracts/packs.ts';
import type { CutBalance } from '#shared/engine/allocation/allocation-plan.ts';
import { scale } from '#shared/engine/rounding.ts';

type Entry = PackingDay['cuttingList'][number];
type Batch = { carcaseId: string; cutId: string; grams: number[] };
type Block = { cuttingList: readonly Entry[]; plan: readonly CutBalance[]; mince: string };

/** What comes off the block, pack by pack: as much as the plan foresees, each pack with a weight of its own. */
export function weighPacks(chance: Chance, { cuttingList, plan, mince }: Block): Batch[] {
  const mincedOf = new Map<string, number>();
  const batches: Batch[] = [];
  for (const entry of cuttingList) {
    if (entry.cutId === mince) continue;
    const planned = plan.find((cut) => cut.cutId === entry.cutId);
    const minced =
      planned && planned.madeGrams > 0 ? scale(entry.foreseenGrams, planned.mincedGrams, planned.madeGrams) : 0;
    mincedOf.set(entry.carcaseId, (mincedOf.get(entry.carcaseId) ?? 0) + minced);
    batches.push(toBatch(chance, entry, entry.foreseenGrams - minced));
  }
  for (const entry of cuttingList) {
    if (entry.cutId === mince) batches.push(toBatch(chance, entry, mincedOf.get(entry.carcaseId) ?? 0));
  }
  return batches.filter((batch) => batch.grams.length > 0);
}

function toBatch(chance: Chance, entry: Entry, grams: number): Batch {
  const { carcaseId, cutId } = entry;
  return { carcaseId, cutId, grams: divide(chance, entry, grams) };
}

/** Packs within the cut's limits that use up the grams, but for a rest too small for a pack. */
function divide(chance: Chance, { minPackGrams, maxPackGrams }: Entry, grams: number): number[] {
  const usual = (minPackGrams + maxPackGrams) / 2;
  const packs: number[] = [];
  let left = grams;
  while (left >= minPackGrams) {
    const wish = Math.round((usual * chance.between(94, 106)) / 100);
    const rest = left - wish;
    // The last packs share what there is, so that no rest is left that would make a pack.
    const pack = rest < minPackGrams ? Math.min(left, maxPackGrams) : wish;
    packs.push(pack);
    left -= pack;
  }
  return packs;
}
