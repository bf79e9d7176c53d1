import type { Reservation } from '#shared/contracts/trade.ts';
import { formatEarTag } from '#shared/domain/ear-tag.ts';
import { formatWeight } from '#shared/domain/words.ts';
import { AppError } from '#shared/errors.ts';
import { findPublishedAllocation, pinLine } from '#server/allocation/allocation-queries.ts';
import { lockCuttingDay } from '#server/carcases/cutting-day-queries.ts';
import { loadDayCutouts, type CarcaseFigures } from '#server/carcases/day-figures.ts';
import { recordMovements } from '#server/carcases/ledger-queries.ts';
import type { Deps, Tx } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { enterLedger, refuseTooMuch } from '#server/packs/carcase-ledger.ts';
import { describeFill } from '#server/packs/fill-work.ts';
import { loadWork } from '#server/packs/packing-day.ts';
import { sideOf } from './describe-reservation.ts';
import { listTradePacks, type TradePack } from './dispatched-queries.ts';
import { describeOne, getReservation, MOVED_ON } from './reservation-service.ts';
import { setDispatchedGrams, updateReservation, type FullReservation, type LineRow } from './trade-queries.ts';

export type Dispatch = {
  reservationId: string;
  version: number;
  weights: { lineId: string; grams: number }[];
  isShortAccepted: boolean;
};

/**
 * The beef leaves: pieces at their scale weight out of the carcase, cuts in the packs that were filled for them, all in
 * one transaction. From here on the reservation costs what left.
 */
export async function dispatchReservation(deps: Deps, byUserId: string, wanted: Dispatch): Promise<Reservation> {
  return deps.db.transaction(async (tx) => {
    const { cuttingDayId } = await getReservation(tx, wanted.reservationId);
    const day = await lockCuttingDay(tx, cuttingDayId);
    const row = await getReservation(tx, wanted.reservationId);
    if (row.state !== 'confirmed' || day?.state === 'closed') throw new AppError('STATE_CHANGED', MOVED_ON);
    const pieces = await weighPieces(tx, row, wanted);
    if (!wanted.isShortAccepted) await refuseUnfilled(tx, row);
    const grams = (await sendPieces(tx, byUserId, { row, pieces })) + (await sendPacks(tx, byUserId, row));
    const values = { state: 'dispatched' as const, answer: `Dispatched: ${formatWeight(grams)} in all.` };
    if (!(await updateReservation(tx, row.id, { version: wanted.version, values }))) {
      throw new AppError('STATE_CHANGED', MOVED_ON);
    }
    const note = { byUserId, action: 'dispatched', subject: 'reservation', subjectId: row.id };
    await recordAudit(tx, { ...note, detail: { grams } });
    return describeOne(tx, await getReservation(tx, row.id));
  });
}

type Piece = { line: LineRow; carcase: CarcaseFigures; side: 'left' | 'right'; grams: number };

/** Every piece with the side that it is cut from and its scale weight; refuses beside its field what lacks one. */
async function weighPieces(tx: Tx, row: FullReservation, { weights }: Dispatch): Promise<Piece[]> {
  const figures = await loadDayCutouts(tx, row.cuttingDayId);
  const published = await findPublishedAllocation(tx, row.cuttingDayId);
  const lines = row.lines.filter((line) => line.kind === 'unit');
  const fields: Record<string, string> = {};
  for (const [index, { lineId }] of weights.entries()) {
    const isKnown = lines.some((line) => line.id === lineId);
    const isTwice = weights.findIndex((each) => each.lineId === lineId) !== index;
    if (!isKnown || isTwice) fields[`weights.${index}.lineId`] = 'No piece of this reservation is weighed here.';
  }
  const pieces = lines.flatMap((line): Piece[] => {
    const side = sideOf(line, { figures, published });
    const carcase = figures.carcases.find((each) => each.row.id === side?.carcaseId);
    const weight = weights.find((each) => each.lineId === line.id);
    if (!weight) fields[`weights.${line.id}`] = 'Weigh every piece that leaves whole.';
    if (!weight || !side || !carcase) return [];
    return [{ line, carcase, side: side.side, grams: weight.grams }];
  });
  if (Object.keys(fields).length > 0) throw new AppError('INVALID_INPUT', 'Nothing was dispatched.', { fields });
  if (pieces.length < lines.length) {
    throw new AppError(
      'NOT_FILLABLE',
      'No side has been named for a piece of this reservation yet. Nothing was dispatched; allocate and publish the day.',
    );
  }
  const live = pieces.find(({ carcase }) => carcase.row.state === 'booked');
  if (!live) return pieces;
  throw new AppError(
    'STATE_CHANGED',
    `${formatEarTag(live.carcase.row.animal.earTag)} has no kill sheet yet. Nothing was dispatched.`,
  );
}

async function refuseUnfilled(tx: Tx, row: FullReservation): Promise<void> {
  const ids = row.lines.map((line) => line.id);
  const { jobs } = await loadWork(tx, row.cuttingDayId);
  const short = jobs
    .filter((job) => ids.includes(job.lineId))
    .map(describeFill)
    .filter((fill) => !fill.isFilled);
  const [first] = short;
  if (!first) return;
  const missing = first.missing.reduce((sum, each) => sum + each.shortGrams, 0);
  throw new AppError(
    'NOT_FILLABLE',
    `${first.item} is ${formatWeight(missing)} short of what is reserved. Nothing was dispatched; fill the orders first, or send what there is.`,
    { figures: { shortGrams: missing, packedGrams: first.grams } },
  );
}

async function sendPieces(tx: Tx, byUserId: string, sent: { row: FullReservation; pieces: Piece[] }): Promise<number> {
  let total = 0;
  for (const { line, carcase, side, grams } of sent.pieces) {
    await enterLedger(tx, carcase, byUserId);
    await refuseTooMuch(tx, carcase, grams);
    await pinLine(tx, { id: line.id, carcaseId: carcase.row.id, side });
    await setDispatchedGrams(tx, line.id, grams);
    const reason = `reservation ${sent.row.reservationNo}: ${side} ${line.unitKind ?? ''}`;
    const movement = { carcaseId: carcase.row.id, fromPlace: 'carcase' as const, toPlace: 'trade' as const };
    await recordMovements(tx, [{ ...movement, grams, reason, byUserId }]);
    total += grams;
  }
  return total;
}

async function sendPacks(tx: Tx, byUserId: string, row: FullReservation): Promise<number> {
  const packs = await listTradePacks(
    tx,
    row.lines.map((line) => line.id),
  );
  await recordMovements(
    tx,
    packs.map(({ packId, carcaseId, grams }) => ({
      carcaseId,
      packId,
      fromPlace: 'chiller' as const,
      toPlace: 'trade' as const,
      grams,
      reason: `reservation ${row.reservationNo}`,
      byUserId,
    })),
  );
  for (const line of row.lines.filter((each) => each.kind === 'cut')) {
    await setDispatchedGrams(tx, line.id, gramsOf(packs.filter((pack) => pack.lineId === line.id)));
  }
  return gramsOf(packs);
}

function gramsOf(packs: readonly TradePack[]): number {
  return packs.reduce((sum, pack) => sum + pack.grams, 0);
}
