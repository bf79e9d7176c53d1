import type { StockItem } from '#shared/engine/allocation/allocation-input.ts';
import type { Db, Tx } from '#server/deps.ts';
import { groupBy } from '#server/farm/group-by.ts';
import { loadWork, type WorkPack } from '#server/packs/packing-day.ts';
import { findPublishedAllocation, type AllocationRow } from './allocation-queries.ts';
import { listWorkingDays } from './shortfall-queries.ts';

/**
 * Frozen packs that a day may count on, as grams by cut: those that lie in its orders, and what is free in the freezer
 * beyond what the plans on sale of other days count on.
 */
export async function readFrozenStock(db: Db | Tx, dayId: string): Promise<StockItem[]> {
  const packs = (await loadWork(db, dayId)).packs.filter(({ isFrozen }) => isFrozen);
  if (packs.length === 0) return [];
  const spoken = await spokenFor(db, dayId);
  return [...groupBy(packs, ({ cutId }) => cutId)].flatMap(([cutId, ofCut]): StockItem[] => {
    const own = ofCut.filter(({ isAssigned }) => isAssigned);
    const free = leaveFor(
      ofCut.filter(({ isAssigned }) => !isAssigned),
      spoken.get(cutId) ?? 0,
    );
    const grams = [...own, ...free].reduce((sum, pack) => sum + pack.grams, 0);
    return grams > 0 ? [{ cutId, state: 'frozen', grams }] : [];
  });
}

/** Whole packs, the oldest first, are left for others until they have enough. */
function leaveFor(packs: readonly WorkPack[], spokenGrams: number): WorkPack[] {
  let open = spokenGrams;
  return packs.filter(({ grams }) => {
    if (open <= 0) return true;
    open -= grams;
    return false;
  });
}

/** What the plans on sale of other days still have to take out of the freezer, in grams by cut. */
async function spokenFor(db: Db | Tx, dayId: string): Promise<Map<string, number>> {
  const spoken = new Map<string, number>();
  for (const other of await listWorkingDays(db)) {
    const plan = other.id === dayId ? null : await findPublishedAllocation(db, other.id);
    if (!plan) continue;
    const taken = groupBy(
      (await loadWork(db, other.id)).packs.filter(({ isFrozen, isAssigned }) => isFrozen && isAssigned),
      ({ cutId }) => cutId,
    );
    for (const [cutId, used] of frozenUse(plan)) {
      const lying = (taken.get(cutId) ?? []).reduce((sum, { grams }) => sum + grams, 0);
      spoken.set(cutId, (spoken.get(cutId) ?? 0) + Math.max(0, used - lying));
    }
  }
  return spoken;
}

/** Grams of frozen stock that a plan uses, by cut. */
export function frozenUse({ plan }: Pick<AllocationRow, 'plan'>): Map<string, number> {
  const used = plan.plan.cuts.map(
    ({ cutId, stockGrams, leftStockGrams = 0 }) => [cutId, stockGrams - leftStockGrams] as const,
  );
  return new Map(used.filter(([, grams]) => grams > 0));
}
