import type { Allocation, Lock } from '#shared/contracts/allocation.ts';
import { AppError } from '#shared/errors.ts';
import { loadDayCutouts, type DayCutouts } from '#server/carcases/day-figures.ts';
import { lockCuttingDay } from '#server/carcases/cutting-day-queries.ts';
import type { Db, Deps, Tx } from '#server/deps.ts';
import { readSettings } from '#server/farm/farm-settings.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { readDayMoney } from '#server/margin/carcase-accounts.ts';
import { enqueue } from '#server/queue.ts';
import {
  addAllocation,
  findLatestAllocation,
  findPublishedAllocation,
  getAllocation,
  listConfirmedLines,
  listOffers,
  storeAnswer,
  type AllocationRow,
  type ReservedLine,
} from './allocation-queries.ts';
import { askAbout, judgeDayMince, loadDayFacts } from './day-facts.ts';
import { describeAllocation, type AllocationFacts } from './describe-allocation.ts';
import { publish } from './publish.ts';
import { explainDay, promiseDay, solveDay, type SolveHow } from './solve-day.ts';

export type Wish = {
  dayId: string;
  locks: readonly Lock[];
  /** Lines of a reservation that is not confirmed yet, worked in as if it were. */
  asked?: readonly ReservedLine[];
};

/** A solved allocation that has not been kept yet. */
export type SolvedDay = Omit<AllocationRow, 'id' | 'createdAt' | 'publishedAt' | 'state'>;

/** Solves a cutting day as it stands now. Nothing is written. Throws NOT_FILLABLE while it has no carcase. */
export async function solveAllocation(
  deps: Deps,
  { dayId, locks, asked = [] }: Wish,
  how: SolveHow = {},
): Promise<SolvedDay> {
  const facts = await loadDayFacts(deps.db, dayId);
  const { figures } = facts;
  const { question, plan } = await solveDay(askAbout(facts, { locks, asked }), deps.solver, how);
  return {
    cuttingDayId: dayId,
    figuresVersion: figures.day.figuresVersion,
    locks: [...locks],
    input: question,
    plan: { plan, weighedCarcaseIds: weighedCarcases(figures), promise: null, explanation: null },
    contributionPence: plan.contributionPence,
    isProven: plan.isProven,
  };
}

function weighedCarcases({ carcases }: DayCutouts): string[] {
  return carcases.filter(({ cutout }) => cutout.cold.source === 'weighed').map(({ row }) => row.id);
}

/** Solves the day with the owner's locks and keeps the answer as a draft; what explains it follows a moment later. */
export async function allocateDay(
  deps: Deps,
  { dayId, locks }: Pick<Wish, 'dayId' | 'locks'>,
  how: SolveHow = {},
): Promise<AllocationRow> {
  const solved = await solveAllocation(deps, { dayId, locks }, how);
  return deps.db.transaction((tx) => keepAllocation(tx, solved));
}

export async function keepAllocation(tx: Tx, solved: SolvedDay): Promise<AllocationRow> {
  const row = await addAllocation(tx, solved);
  await enqueue(tx, 'explain-allocation', { allocationId: row.id });
  return row;
}

/** The worker's task: the promise first, since nothing can be published without it, then the explanations. */
export async function explainAllocation(deps: Deps, allocationId: string): Promise<void> {
  const row = await ensurePromise(deps, await getAllocation(deps.db, allocationId));
  if (row.plan.explanation) return;
  const solved = { question: row.input, plan: row.plan.plan };
  await storeAnswer(deps.db, row.id, { explanation: await explainDay(solved, deps.solver) });
}

/** The allocation with its promise, worked out now if nobody has done it yet. */
async function ensurePromise(deps: Deps, row: AllocationRow): Promise<AllocationRow> {
  if (row.plan.promise || !row.isProven) return row;
  const promise = await promiseDay({ question: row.input, plan: row.plan.plan }, deps.solver);
  await storeAnswer(deps.db, row.id, { promise });
  return { ...row, plan: { ...row.plan, promise } };
}

/** For an answer that is kept and published in one go. */
export async function withPromise(deps: Deps, solved: SolvedDay): Promise<SolvedDay> {
  const promise = await promiseDay({ question: solved.input, plan: solved.plan.plan }, deps.solver);
  return { ...solved, plan: { ...solved.plan, promise } };
}

export type PublishWish = { allocationId: string; figuresVersion: number; byUserId: string | null };

/** Puts an allocation on sale, in one transaction. The caller names the figures that it has seen. */
export async function publishAllocation(deps: Deps, wish: PublishWish): Promise<AllocationRow> {
  await ensurePromise(deps, await getAllocation(deps.db, wish.allocationId));
  return deps.db.transaction(async (tx) => {
    const row = await getAllocation(tx, wish.allocationId);
    if (row.figuresVersion !== wish.figuresVersion) {
      throw new AppError('STATE_CHANGED', 'You were looking at older figures. Nothing was published; look again.');
    }
    await publishRow(deps, tx, { row, byUserId: wish.byUserId });
    return getAllocation(tx, row.id);
  });
}

/** For callers that already hold a transaction: locks the day, then publishes. */
export async function publishRow(
  deps: Deps,
  tx: Tx,
  { row, byUserId }: { row: AllocationRow; byUserId: string | null },
): Promise<void> {
  const day = await lockCuttingDay(tx, row.cuttingDayId);
  if (!day) throw new AppError('NOT_FOUND', 'There is no such cutting day.');
  if (day.state === 'closed') throw new AppError('STATE_CHANGED', 'This cutting day is closed. Nothing was published.');
  await publish(tx, { row, day, at: deps.clock.now(), byUserId });
}

/**
 * Works the day out again after weights, trade or sales have moved. Publishes only if the owner has switched that on
 * and the day is on sale already; otherwise the new answer waits as a draft.
 */
export async function replanDay(deps: Deps, dayId: string): Promise<void> {
  const published = await findPublishedAllocation(deps.db, dayId);
  if (!published) return;
  try {
    const row = await allocateDay(deps, { dayId, locks: published.locks });
    const settings = await readSettings(deps.db, deps.clock.today());
    if (!settings.isReallocationAutomatic) return;
    await publishAllocation(deps, { allocationId: row.id, figuresVersion: row.figuresVersion, byUserId: null });
  } catch (error) {
    // The owner meets the refusal on Today, where the day stands as out of date.
    if (!(error instanceof AppError)) throw error;
    await recordAudit(deps.db, {
      byUserId: null,
      action: 're-planning refused',
      subject: 'cutting day',
      subjectId: dayId,
      detail: { code: error.code, message: error.message },
    });
  }
}

export async function getDayAllocations(
  deps: Deps,
  dayId: string,
): Promise<{ latest: Allocation | null; published: Allocation | null }> {
  const facts = await loadFacts(deps.db, dayId);
  const latest = await findLatestAllocation(deps.db, dayId);
  const published = await findPublishedAllocation(deps.db, dayId);
  return {
    latest: latest && describeAllocation(latest, facts),
    published: published && describeAllocation(published, facts),
  };
}

export async function viewAllocation(deps: Deps, row: AllocationRow): Promise<Allocation> {
  return describeAllocation(row, await loadFacts(deps.db, row.cuttingDayId));
}

async function loadFacts(db: Db, dayId: string): Promise<AllocationFacts> {
  const figures = await loadDayCutouts(db, dayId);
  return {
    figures,
    offers: await listOffers(db, dayId),
    reserved: await listConfirmedLines(db, dayId),
    money: await readDayMoney(db, figures),
    minceCaution: judgeDayMince(figures, await readSettings(db, figures.day.day)).caution,
  };
}
