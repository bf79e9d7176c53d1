import { formatCount, formatWeight } from '#shared/domain/words.ts';
import { AppError } from '#shared/errors.ts';
import { findPublishedAllocation, type ReservedLine } from '#server/allocation/allocation-queries.ts';
import {
  keepAllocation,
  publishRow,
  solveAllocation,
  withPromise,
  type SolvedDay,
} from '#server/allocation/allocation-service.ts';
import { refuseIfStale } from '#server/allocation/publish.ts';
import { lockCuttingDay } from '#server/carcases/cutting-day-queries.ts';
import type { Deps } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { readProductNames, type ProductNames } from './product-names.ts';
import { queueAnswer } from './reservation-mail.ts';
import { updateReservation, type FullReservation, type LineRow } from './trade-queries.ts';

/** Sales may move while a solve runs; after three such meetings the caller is asked to try again. */
const TRIES = 3;

/**
 * Solves the day with the reservation as confirmed; then, under the day's lock and in one transaction, confirms it and
 * publishes the new offers. Throws NOT_FILLABLE with what is still possible, STATE_CHANGED when it lost every race.
 */
export async function workIn(deps: Deps, row: FullReservation, byUserId: string | null): Promise<void> {
  for (let attempt = 1; ; attempt += 1) {
    const published = await findPublishedAllocation(deps.db, row.cuttingDayId);
    const solved = await solveAllocation(deps, {
      dayId: row.cuttingDayId,
      locks: published?.locks ?? [],
      asked: row.lines.map((line): ReservedLine => ({ ...line, ...named(row) })),
    });
    await refuseIfShort(deps, row, solved);
    refuseUnproven(solved);
    try {
      await confirm(deps, { row, solved: await withPromise(deps, solved), byUserId });
      return;
    } catch (error) {
      const isRace = error instanceof AppError && error.code === 'STATE_CHANGED';
      if (!isRace || attempt === TRIES) throw error;
    }
  }
}

function named({ reservationNo, businessName, accountId }: FullReservation) {
  return { reservationNo, businessName, accountId };
}

const SINGULAR = { boxes: 'box', packs: 'pack', units: 'piece' } as const;
const PLURAL = { boxes: 'boxes', packs: 'packs', units: 'pieces' } as const;

/** Whatever is short, be it of this reservation or of an earlier promise, the answer is no. */
async function refuseIfShort(deps: Deps, row: FullReservation, { plan }: SolvedDay): Promise<void> {
  const short = plan.plan.shortfalls;
  if (short.length === 0) return;
  const products = await readProductNames(deps.db);
  const own = new Map(row.lines.map((line) => [line.id, nameOf(line, products)]));
  // Other people's orders are not named to a butcher.
  const isForeign = short.some(({ id }) => !own.has(id));
  const missing = short.flatMap(({ id, short: count, unit }) => {
    const name = own.get(id);
    if (!name) return [];
    const amount = unit === 'grams' ? formatWeight(count) : formatCount(count, SINGULAR[unit], PLURAL[unit]);
    return [`${name}: ${amount} short.`];
  });
  if (isForeign) missing.push('What is promised to others would no longer be met.');
  const possible = row.lines.flatMap((line) => {
    const planned = plan.plan.trade.find((candidate) => candidate.lineId === line.id);
    const name = own.get(line.id) ?? '';
    if (!planned || (planned.cutGrams === 0 && planned.units.length === 0)) return [];
    return [planned.cutGrams > 0 ? `${formatWeight(planned.cutGrams)} of ${name}` : name];
  });
  // Beside a broken promise nothing is offered: the plan's amounts would come out of that promise.
  const isPossible = possible.length > 0 && !isForeign;
  const rest = isPossible ? `Still possible: ${possible.join('; ')}.` : 'Another day may still have it.';
  throw new AppError('NOT_FILLABLE', `Not everything can be met beside what is sold. ${missing.join(' ')} ${rest}`);
}

/** A plan that ran out of time says nothing about what is possible: the reservation waits for another try. */
function refuseUnproven({ isProven }: SolvedDay): void {
  if (isProven) return;
  throw new AppError(
    'SOLVER_FAILED',
    'The day could not be worked out in time. Nothing was changed and the reservation waits as asked; try again.',
  );
}

function nameOf({ cutId, unitKind }: LineRow, products: ProductNames): string {
  const product = cutId ? `cut:${cutId}` : (unitKind ?? '');
  return products.get(product) ?? product;
}

type Confirmation = { row: FullReservation; solved: SolvedDay; byUserId: string | null };

async function confirm(deps: Deps, { row, solved, byUserId }: Confirmation): Promise<void> {
  await deps.db.transaction(async (tx) => {
    const day = await lockCuttingDay(tx, row.cuttingDayId);
    if (!day) throw new AppError('NOT_FOUND', 'There is no such cutting day.');
    const values = { state: 'confirmed' as const, answer: 'Confirmed. Weights are settled on the scale.' };
    if (!(await updateReservation(tx, row.id, { version: row.version, values }))) {
      throw new AppError('NOT_FOUND', 'This reservation was cancelled or answered meanwhile. Nothing was changed.');
    }
    const allocation = await keepAllocation(tx, solved);
    // A day that is not on sale yet keeps the answer as a draft: the owner opens it.
    if (await findPublishedAllocation(tx, day.id)) await publishRow(deps, tx, { row: allocation, byUserId });
    else await refuseIfStale(tx, allocation, day);
    await recordAudit(tx, { byUserId, action: 'confirmed', subject: 'reservation', subjectId: row.id });
    await queueAnswer(deps, tx, row.id);
  });
}
