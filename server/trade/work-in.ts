import { formatCount, formatWeight } from '#shared/domain/words.ts';
import { AppError } from '#shared/errors.ts';
import { addAllocation, findPublishedAllocation, type ReservedLine } from '#server/allocation/allocation-queries.ts';
import { publishRow, solveAllocation, type SolvedDay } from '#server/allocation/allocation-service.ts';
import { refuseIfStale } from '#server/allocation/publish.ts';
import { lockCuttingDay } from '#server/carcases/cutting-day-queries.ts';
import type { Deps } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { updateReservation, type FullReservation } from './trade-queries.ts';

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
    refuseIfShort(row, solved);
    try {
      await confirm(deps, { row, solved, byUserId });
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

/** Whatever is short, be it of this reservation or of an earlier promise, the answer is no. */
function refuseIfShort(row: FullReservation, { plan }: SolvedDay): void {
  const short = plan.plan.shortfalls;
  if (short.length === 0) return;
  const missing = short.map(({ name, short: count, unit }) =>
    unit === 'grams'
      ? `${name}: ${formatWeight(count)} short`
      : `${name}: ${formatCount(count, unit.slice(0, -1), unit)} short`,
  );
  const possible = row.lines.flatMap((line) => {
    const planned = plan.plan.trade.find((candidate) => candidate.lineId === line.id);
    if (!planned || (planned.cutGrams === 0 && planned.units.length === 0)) return [];
    return [planned.cutGrams > 0 ? `${planned.name}: ${formatWeight(planned.cutGrams)}` : planned.name];
  });
  const rest = possible.length > 0 ? ` Still possible: ${possible.join('; ')}.` : ' Another day may still have it.';
  throw new AppError('NOT_FILLABLE', `Not everything can be met beside what is sold. ${missing.join('; ')}.${rest}`);
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
    const allocation = await addAllocation(tx, solved);
    // A day that is not on sale yet keeps the answer as a draft: the owner opens it.
    if (await findPublishedAllocation(tx, day.id)) await publishRow(deps, tx, { row: allocation, byUserId });
    else await refuseIfStale(tx, allocation, day);
    await recordAudit(tx, { byUserId, action: 'confirmed', subject: 'reservation', subjectId: row.id });
  });
}
