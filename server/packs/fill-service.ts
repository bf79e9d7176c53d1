import type { PackingDay } from '#shared/contracts/packs.ts';
import type { WeighedPack } from '#shared/engine/box-fill/box-fill-types.ts';
import { fillBoxes } from '#shared/engine/box-fill/fill-boxes.ts';
import { canMoveOrder } from '#shared/domain/order-state.ts';
import { AppError } from '#shared/errors.ts';
import { lockCuttingDay } from '#server/carcases/cutting-day-queries.ts';
import { recordMovements } from '#server/carcases/ledger-queries.ts';
import type { Deps, Tx } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { choosePacks } from './choose-packs.ts';
import { describeFill, type Job } from './fill-work.ts';
import { endAssignments, insertAssignments, listOrderWork, moveOrder } from './pack-queries.ts';
import { mendBoxes } from './mend-boxes.ts';
import { loadWork, readPackingDay, type PackingWork } from './packing-day.ts';
import { settleWeights } from './settle-weights.ts';

/** Ties between equal fills are broken by a seed of its own, so that the same packs always fall the same way. */
export const SEED = 1;

export type Placement = { pack: WeighedPack; job: Job; boxLine: string };

/**
 * Puts the packs in the chiller into the day's orders: butchers' cuts and loose packs by weight, boxes by the engine's
 * fill. What is filled stays as it is, and so does every packed order but where a
 * broken box can only be mended by changing a pack with it; what cannot be mended is taken apart and filled again.
 */
export async function fillOrders(deps: Deps, byUserId: string, dayId: string): Promise<PackingDay> {
  return deps.db.transaction(async (tx) => {
    const day = await lockCuttingDay(tx, dayId);
    if (!day) throw new AppError('NOT_FOUND', 'There is no such cutting day.');
    if (day.state === 'closed') throw new AppError('STATE_CHANGED', 'This cutting day is closed. Nothing was changed.');
    await mendBoxes(tx, byUserId, await loadWork(tx, dayId));
    await takeApart(tx, byUserId, await loadWork(tx, dayId));
    const work = await loadWork(tx, dayId);
    const placements = planPlacements(work);
    await place(tx, byUserId, { work, placements });
    await markPacked(deps, tx, dayId);
    const detail = { packs: placements.length };
    await recordAudit(tx, { byUserId, action: 'filled', subject: 'cutting day', subjectId: dayId, detail });
    return readPackingDay(tx, dayId);
  });
}

/** Boxes that a lost or re-weighed pack has broken give their packs back, to be filled as well as the rest allow. */
export async function takeApart(tx: Tx, byUserId: string, { jobs, packs }: PackingWork): Promise<void> {
  const broken = jobs.filter((job) => job.kind === 'box' && !job.isPacked && !describeFill(job).isFilled);
  const ids = broken.flatMap((job) => job.packs.map((pack) => pack.id));
  if (ids.length === 0) return;
  await endAssignments(tx, ids);
  const back = packs.filter((pack) => ids.includes(pack.id) && pack.place === 'order');
  await recordMovements(
    tx,
    back.map(({ id, carcaseId, grams, isFrozen }) => ({
      carcaseId,
      packId: id,
      fromPlace: 'order' as const,
      toPlace: storeOf({ isFrozen }),
      grams,
      reason: 'box filled again',
      byUserId,
    })),
  );
}

/** Packs in the chiller that nobody has, a butcher's waiting there in his name; and the freezer's from earlier days. */
export function freePacks(packs: PackingWork['packs']): WeighedPack[] {
  return packs
    .filter(({ place, isAssigned, isFrozen }) => !isAssigned && place === storeOf({ isFrozen }))
    .map(({ id, cutId, grams, isFrozen }) => ({ id, cutId, grams, state: isFrozen ? 'frozen' : 'fresh' }));
}

/** Where a pack waits that is in no order: what was frozen goes back into the freezer. */
export function storeOf({ isFrozen }: { isFrozen: boolean }): 'freezer' | 'chiller' {
  return isFrozen ? 'freezer' : 'chiller';
}

export function planPlacements({ jobs, packs }: PackingWork): Placement[] {
  const free = freePacks(packs);
  const open = jobs.filter((job) => !job.isPacked && !describeFill(job).isFilled);
  const byWeight = choosePacks(open, free);
  const used = new Set(byWeight.map(({ pack }) => pack.id));
  const boxes = open.filter((job) => job.kind === 'box');
  const fill = fillBoxes({
    boxes: boxes.map((job) => ({ id: job.id, recipe: job.recipe, earlierGiveAwayGrams: 0 })),
    packs: free.filter((pack) => !used.has(pack.id)),
    kept: [],
    seed: SEED,
  });
  const boxed = fill.boxes.flatMap((box) => {
    const job = boxes.find((candidate) => candidate.id === box.boxId);
    // A box that cannot be made whole takes nothing: its packs may make another order whole.
    if (!job || !box.isFilled) return [];
    return box.packs.map(({ lineId, ...pack }) => ({ pack, job, boxLine: lineId }));
  });
  return [...byWeight.map((placed) => ({ ...placed, boxLine: '' })), ...boxed];
}

type Placing = { work: PackingWork; placements: readonly Placement[] };

export async function place(tx: Tx, byUserId: string, { work, placements }: Placing): Promise<void> {
  await insertAssignments(
    tx,
    placements.map(({ pack, job, boxLine }) => ({
      packId: pack.id,
      ...(job.kind === 'trade' ? { reservationLineId: job.lineId } : { orderLineId: job.lineId }),
      copy: job.copy,
      boxLine,
    })),
  );
  await recordMovements(
    tx,
    placements.flatMap(({ pack, job }) => {
      const row = work.packs.find((candidate) => candidate.id === pack.id);
      // A butcher's packs wait in the chiller until they are dispatched.
      if (!row || job.kind === 'trade') return [];
      const movement = { carcaseId: row.carcaseId, packId: pack.id, grams: pack.grams, byUserId };
      return [{ ...movement, fromPlace: storeOf(row), toPlace: 'order' as const, reason: `order ${job.orderNo}` }];
    }),
  );
}

/** An order is packed once everything in it is; then its weights are settled. */
async function markPacked(deps: Deps, tx: Tx, dayId: string): Promise<void> {
  const { jobs } = await loadWork(tx, dayId);
  const orders = new Map((await listOrderWork(tx, dayId)).map((work) => [work.orderId, work.state]));
  for (const [orderId, state] of orders) {
    const ofOrder = jobs.filter((job) => job.orderId === orderId);
    const isPacked = ofOrder.every((job) => describeFill(job).isFilled);
    // A mended box may have changed a pack with an order that was packed before.
    if (isPacked && state === 'packed') await settleWeights(deps, tx, { orderId, jobs });
    if (!isPacked || !canMoveOrder(state, 'packed')) continue;
    if (await moveOrder(tx, orderId, { from: state, to: 'packed' })) await settleWeights(deps, tx, { orderId, jobs });
  }
}
