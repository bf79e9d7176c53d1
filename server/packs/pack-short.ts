import type { PackingDay } from '#shared/contracts/packs.ts';
import { fillBoxes } from '#shared/engine/box-fill/fill-boxes.ts';
import { AppError } from '#shared/errors.ts';
import { lockCuttingDay } from '#server/carcases/cutting-day-queries.ts';
import type { Deps, Tx } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { freePacks, place, planPlacements, SEED, takeApart, type Placement } from './fill-service.ts';
import { describeFill, type Job } from './fill-work.ts';
import { moveOrder } from './pack-queries.ts';
import { loadWork, readPackingDay, type PackingWork } from './packing-day.ts';
import { settleWeights } from './settle-weights.ts';

export type ShortOrder = { dayId: string; orderNo: number };

/**
 * The owner's way out when an order cannot be filled: it goes with what there is, and what is missing is paid back. The
 * order counts as packed from then on.
 */
export async function packShort(deps: Deps, byUserId: string, { dayId, orderNo }: ShortOrder): Promise<PackingDay> {
  return deps.db.transaction(async (tx) => {
    const day = await lockCuttingDay(tx, dayId);
    if (!day) throw new AppError('NOT_FOUND', 'There is no such cutting day.');
    const isOurs = (job: Job) => job.orderId !== null && job.orderNo === orderNo;
    const open = (await loadWork(tx, dayId)).jobs.filter(isOurs);
    const orderId = open[0]?.orderId;
    if (!orderId) throw new AppError('NOT_FOUND', 'There is no such order on this day.');
    if (day.state === 'closed' || open.some((job) => job.isPacked)) {
      throw new AppError('STATE_CHANGED', `Order ${orderNo} is packed already. Nothing was changed.`);
    }
    await takeApart(tx, byUserId, await ofOrder(tx, dayId, isOurs));
    await placeNext(tx, byUserId, { dayId, isOurs, plan: planPlacements });
    await placeNext(tx, byUserId, { dayId, isOurs, plan: planPartBoxes });
    const { jobs } = await ofOrder(tx, dayId, isOurs);
    if (jobs.every((job) => job.packs.length === 0)) {
      throw new AppError(
        'NOT_FILLABLE',
        `There is no pack for order ${orderNo}. Nothing was changed; cancel it instead.`,
      );
    }
    await moveOrder(tx, orderId, { from: 'confirmed', to: 'packed' });
    await settleWeights(deps, tx, { orderId, jobs });
    const short = jobs.map(describeFill).filter((fill) => !fill.isFilled);
    const detail = { short: short.map(({ item, copy, missing }) => ({ item, copy, missing })) };
    await recordAudit(tx, { byUserId, action: 'packed short', subject: 'order', subjectId: orderId, detail });
    return readPackingDay(tx, dayId);
  });
}

type OurJobs = { dayId: string; isOurs: (job: Job) => boolean; plan: (work: PackingWork) => Placement[] };

async function placeNext(tx: Tx, byUserId: string, { dayId, isOurs, plan }: OurJobs): Promise<void> {
  const work = await ofOrder(tx, dayId, isOurs);
  await place(tx, byUserId, { work, placements: plan(work) });
}

async function ofOrder(tx: Tx, dayId: string, isOurs: (job: Job) => boolean): Promise<PackingWork> {
  const { jobs, packs } = await loadWork(tx, dayId);
  return { jobs: jobs.filter(isOurs), packs };
}

/** Each open box as full as the packs there are can make it. */
function planPartBoxes({ jobs, packs }: PackingWork): Placement[] {
  const open = jobs.filter((job) => job.kind === 'box' && !describeFill(job).isFilled);
  const boxes = open.flatMap((job) =>
    job.kind === 'box' ? [{ id: job.id, recipe: job.recipe, earlierGiveAwayGrams: 0 }] : [],
  );
  const fill = fillBoxes({ boxes, packs: freePacks(packs), kept: [], seed: SEED });
  return fill.boxes.flatMap((box) => {
    const job = open.find((candidate) => candidate.id === box.boxId);
    return job ? box.packs.map(({ lineId, ...pack }) => ({ pack, job, boxLine: lineId })) : [];
  });
}
