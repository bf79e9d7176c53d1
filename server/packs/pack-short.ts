import type { PackingDay } from '#shared/contracts/packs.ts';
import type { Recipe } from '#shared/engine/allocation/allocation-input.ts';
import type { PlacedPack, WeighedPack } from '#shared/engine/box-fill/box-fill-types.ts';
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

/** Each box by a recipe that asks for no more than the packs there are can give. */
function planPartBoxes({ jobs, packs }: PackingWork): Placement[] {
  const free = freePacks(packs);
  return jobs.flatMap((job): Placement[] => {
    if (job.kind !== 'box' || describeFill(job).isFilled) return [];
    const placements = fillPart(job, job.recipe, free).map(({ lineId, ...pack }) => ({ pack, job, boxLine: lineId }));
    for (const { pack } of placements) {
      free.splice(
        free.findIndex((each) => each.id === pack.id),
        1,
      );
    }
    return placements;
  });
}

/** Lowers the recipe by what each try still misses, until what is left of it can be met. */
function fillPart(job: Job, recipe: Recipe, free: readonly WeighedPack[]): PlacedPack[] {
  const fill = fillBoxes({
    boxes: [{ id: job.id, recipe, earlierGiveAwayGrams: 0 }],
    packs: free,
    kept: [],
    seed: SEED,
  });
  const [box] = fill.boxes;
  if (!box) return [];
  if (box.isFilled) return box.packs;
  const lower = lowerRecipe(recipe, box);
  return lower ? fillPart(job, lower, free) : [];
}

type Shortage = Pick<ReturnType<typeof fillBoxes>['boxes'][number], 'missing' | 'grams'>;

/** Null once nothing of the recipe can be lowered any more. */
function lowerRecipe(recipe: Recipe, { missing, grams }: Shortage): Recipe | null {
  const lines = recipe.lines.map((line) => {
    const short = missing.find((each) => each.lineId === line.id);
    if (!short) return line;
    const minGrams = Math.max(0, line.minGrams - short.shortGrams);
    return { ...line, minGrams, minPacks: Math.max(0, line.minPacks - short.shortPacks) };
  });
  const guaranteedGrams = Math.min(recipe.guaranteedGrams, grams);
  const isLower =
    guaranteedGrams < recipe.guaranteedGrams ||
    lines.some((line, index) => {
      const before = recipe.lines[index];
      return before && (line.minGrams < before.minGrams || line.minPacks < before.minPacks);
    });
  return isLower ? { ...recipe, lines, guaranteedGrams } : null;
}
