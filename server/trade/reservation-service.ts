import type { NewReservation, Reservation } from '#shared/contracts/trade.ts';
import { formatDayTime } from '#shared/domain/words.ts';
import { AppError } from '#shared/errors.ts';
import { findPublishedAllocation } from '#server/allocation/allocation-queries.ts';
import { freeTradeOffers } from '#server/allocation/publish.ts';
import { findDay, lockCuttingDay } from '#server/carcases/cutting-day-queries.ts';
import { loadDayCutouts } from '#server/carcases/day-figures.ts';
import type { Db, Deps, Tx } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { readSettings } from '#server/farm/farm-settings.ts';
import { enqueue } from '#server/queue.ts';
import { priceLines } from './check-lines.ts';
import { describeReservations } from './describe-reservation.ts';
import { queueAnswer } from './reservation-mail.ts';
import {
  addReservation,
  findReservation,
  findReservationByKey,
  listReservationRows,
  updateReservation,
  type AccountRow,
  type FullReservation,
} from './trade-queries.ts';
import { workIn } from './work-in.ts';

export const MOVED_ON = 'This reservation has changed since you opened it. Nothing was done; look at it again.';

export async function listReservations(deps: Deps, accountId: string | null): Promise<Reservation[]> {
  return describeReservations(deps.db, await listReservationRows(deps.db, accountId));
}

/**
 * Keeps what a butcher asks for, then works it in at once where the owner has allowed that and the day is on sale;
 * otherwise it waits as asked and holds nothing. The same request key finds the first reservation again.
 */
export async function reserve(deps: Deps, account: AccountRow, wanted: NewReservation): Promise<Reservation> {
  const known = await findReservationByKey(deps.db, wanted.requestKey);
  if (known) return describeOwn(deps, account, known);
  const day = await findDay(deps.db, wanted.dayId);
  if (!day || day.state === 'closed') throw new AppError('NOT_FOUND', 'There is no such cutting day to reserve on.');
  if (deps.clock.now() >= day.cutOffAt) {
    throw new AppError(
      'CUTOFF_PASSED',
      `Reservations for this day closed on ${formatDayTime(day.cutOffAt)}. Nothing was reserved; choose another day.`,
    );
  }
  const lines = priceLines(account, wanted, await loadDayCutouts(deps.db, day.id));
  const id = await deps.db.transaction(async (tx) => {
    const row = {
      accountId: account.id,
      cuttingDayId: day.id,
      requestKey: wanted.requestKey,
      cuttingNote: wanted.cuttingNote,
      state: 'asked' as const,
    };
    const added = await addReservation(tx, row, lines);
    if (added) {
      const note = { byUserId: account.userId, action: 'asked', subject: 'reservation', subjectId: added };
      await recordAudit(tx, note);
    }
    return added;
  });
  const settings = await readSettings(deps.db, deps.clock.today());
  const isOnSale = (await findPublishedAllocation(deps.db, day.id)) !== null;
  if (id && settings.isReallocationAutomatic && isOnSale) await confirmOrRefuse(deps, id);
  const row = await findReservationByKey(deps.db, wanted.requestKey);
  if (!row) throw new Error('the reservation was not kept');
  return describeOwn(deps, account, row);
}

function describeOwn(deps: Deps, account: AccountRow, row: FullReservation): Promise<Reservation> {
  if (row.accountId !== account.id) throw new AppError('NOT_FOUND', 'There is no such reservation.');
  return describeOne(deps.db, row);
}

export async function describeOne(db: Db | Tx, row: FullReservation): Promise<Reservation> {
  const [described] = await describeReservations(db, [row]);
  if (!described) throw new Error(`reservation ${row.id} has no cutting day`);
  return described;
}

/**
 * The way without an owner at hand: what cannot be worked in is refused, with what is still possible. Whatever else
 * comes between leaves it as asked, for the owner to answer.
 */
async function confirmOrRefuse(deps: Deps, reservationId: string): Promise<void> {
  const row = await getReservation(deps.db, reservationId);
  try {
    await workIn(deps, row, null);
  } catch (error) {
    if (!(error instanceof AppError)) throw error;
    if (error.code !== 'NOT_FILLABLE') return;
    const { message: answer } = error;
    await deps.db.transaction(async (tx) => {
      const values = { state: 'refused' as const, answer };
      if (!(await updateReservation(tx, row.id, { version: row.version, values }))) return;
      await recordAudit(tx, { byUserId: null, action: 'refused', subject: 'reservation', subjectId: row.id });
      await queueAnswer(deps, tx, row.id);
    });
  }
}

export type Answer = { reservationId: string; version: number };

/** The owner's yes: worked in by allocating again, together with the offers that shrink for it. */
export async function confirmReservation(deps: Deps, byUserId: string, answer: Answer): Promise<Reservation> {
  const row = await getAsked(deps.db, answer);
  await workIn(deps, row, byUserId);
  return describeOne(deps.db, await getReservation(deps.db, row.id));
}

export async function refuseReservation(
  deps: Deps,
  byUserId: string,
  { reservationId, version, answer }: Answer & { answer: string },
): Promise<Reservation> {
  return deps.db.transaction(async (tx) => {
    const row = await getAsked(tx, { reservationId, version });
    if (!(await updateReservation(tx, row.id, { version, values: { state: 'refused', answer } }))) {
      throw new AppError('STATE_CHANGED', MOVED_ON);
    }
    await recordAudit(tx, { byUserId, action: 'refused', subject: 'reservation', subjectId: row.id });
    await queueAnswer(deps, tx, row.id);
    return describeOne(tx, await getReservation(tx, row.id));
  });
}

/** Until the cut-off a butcher may step back. What was reserved goes to the next plan of the day. */
export async function cancelReservation(deps: Deps, account: AccountRow, answer: Answer): Promise<Reservation> {
  return deps.db.transaction(async (tx) => {
    const row = await getReservation(tx, answer.reservationId);
    if (row.accountId !== account.id) throw new AppError('NOT_FOUND', 'There is no such reservation.');
    const day = await lockCuttingDay(tx, row.cuttingDayId);
    if (row.state !== 'asked' && row.state !== 'confirmed') throw new AppError('STATE_CHANGED', MOVED_ON);
    if (row.state === 'confirmed' && day && deps.clock.now() >= day.cutOffAt) {
      throw new AppError('CUTOFF_PASSED', 'The cut-off has passed and this reservation stands. Please ring the farm.');
    }
    const lineIds = row.lines.map((line) => line.id);
    if (row.state === 'confirmed') await freeTradeOffers(tx, row.cuttingDayId, lineIds);
    const values = { state: 'cancelled' as const, answer: 'Cancelled by you.' };
    if (!(await updateReservation(tx, row.id, { version: answer.version, values }))) {
      throw new AppError('STATE_CHANGED', MOVED_ON);
    }
    const note = { byUserId: account.userId, action: 'cancelled', subject: 'reservation', subjectId: row.id };
    await recordAudit(tx, note);
    if (row.state === 'confirmed') await enqueue(tx, 'replan-day', { dayId: row.cuttingDayId });
    return describeOne(tx, await getReservation(tx, row.id));
  });
}

export async function getReservation(db: Db | Tx, id: string): Promise<FullReservation> {
  const row = await findReservation(db, id);
  if (!row) throw new AppError('NOT_FOUND', 'There is no such reservation.');
  return row;
}

async function getAsked(db: Db | Tx, { reservationId, version }: Answer): Promise<FullReservation> {
  const row = await getReservation(db, reservationId);
  if (row.state !== 'asked' || row.version !== version) throw new AppError('STATE_CHANGED', MOVED_ON);
  return row;
}
