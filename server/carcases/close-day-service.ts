import type { CuttingDay } from '#shared/contracts/carcases.ts';
import { formatEarTag } from '#shared/domain/ear-tag.ts';
import { formatCount, formatGrams } from '#shared/domain/words.ts';
import { AppError } from '#shared/errors.ts';
import { scale } from '#shared/engine/rounding.ts';
import { listConfirmedLines, type ReservedLine } from '#server/allocation/allocation-queries.ts';
import type { Deps, Tx } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { listBalances, listLedgerCarcases, recordMovements, type Movement } from './ledger-queries.ts';
import { markSoldThrough } from './carcase-queries.ts';
import { closeDay, listUnsettledOrders, listUnsettledReservations, lockCuttingDay } from './cutting-day-queries.ts';
import { getCuttingDay } from './cutting-day-service.ts';
import { loadDayCutouts, type CarcaseFigures } from './day-figures.ts';
import { readPublishedWays } from './published-plan.ts';

/** Bone, fat and loss that lie unweighed may differ from the estimate by this much of the carcase: common practice. */
const UNWEIGHED_PERCENT = 5;

/** Closes a day for good once nobody waits for anything and every gram has a place. */
export async function closeCuttingDay(
  deps: Deps,
  byUserId: string,
  { dayId, version }: { dayId: string; version: number },
): Promise<CuttingDay> {
  return deps.db.transaction(async (tx) => {
    const day = await lockCuttingDay(tx, dayId);
    if (!day) throw new AppError('NOT_FOUND', 'There is no such cutting day.');
    refuseWaiting('order', await listUnsettledOrders(tx, dayId));
    refuseWaiting('reservation', await listUnsettledReservations(tx, dayId));
    await settleGrams(tx, byUserId, dayId);
    if (!(await closeDay(tx, dayId, version))) {
      throw new AppError(
        'STATE_CHANGED',
        day.state === 'closed'
          ? 'This cutting day is closed already.'
          : 'Somebody else changed this cutting day meanwhile. It is still open; look at it again.',
        { figures: { yourVersion: version, presentVersion: day.version } },
      );
    }
    await recordAudit(tx, { byUserId, action: 'closed', subject: 'cutting day', subjectId: dayId });
    return getCuttingDay(tx, dayId);
  });
}

function refuseWaiting(what: 'order' | 'reservation', numbers: readonly number[]): void {
  if (numbers.length === 0) return;
  const named = numbers.slice(0, 5).join(', ') + (numbers.length > 5 ? ' and others' : '');
  throw new AppError(
    'STATE_CHANGED',
    `${formatCount(numbers.length, what)} of this day ${numbers.length === 1 ? 'is' : 'are'} not settled yet: ${named}. The day stays open.`,
    { figures: { waiting: numbers.length } },
  );
}

/**
 * What still lies in a carcase is bone, fat and loss and goes to waste; packs that nobody bought go to the freezer. More
 * than bone, fat and loss explain means that product lies unweighed.
 */
async function settleGrams(tx: Tx, byUserId: string, dayId: string): Promise<void> {
  const { carcases } = await loadDayCutouts(tx, dayId, await readPublishedWays(tx, dayId));
  const ids = carcases.map(({ row }) => row.id);
  if (ids.length === 0) return;
  await enterLedger(tx, byUserId, carcases);
  const whole = (await listConfirmedLines(tx, dayId)).filter((line) => line.kind === 'unit');
  const balances = await listBalances(tx, ids);
  const movements: Movement[] = [];
  for (const carcase of carcases) {
    const left = balances.find(({ carcaseId, place }) => carcaseId === carcase.row.id && place === 'carcase');
    if (!left || left.grams <= 0) continue;
    if (left.grams > mostWaste(carcase, whole)) throw unweighed(carcase, left.grams);
    const reason = 'bone, fat and loss';
    movements.push({ ...moved(left, byUserId), fromPlace: 'carcase', toPlace: 'waste', reason });
  }
  for (const unsold of balances.filter(({ place }) => place === 'chiller')) {
    movements.push({ ...moved(unsold, byUserId), fromPlace: 'chiller', toPlace: 'freezer', reason: 'left of the day' });
  }
  await recordMovements(tx, movements);
  await markSoldThrough(tx, ids);
}

/** A carcase of which no pack was ever weighed enters with its cold weight, so that what becomes of it can be said. */
async function enterLedger(tx: Tx, byUserId: string, carcases: readonly CarcaseFigures[]): Promise<void> {
  const known = await listLedgerCarcases(
    tx,
    carcases.map(({ row }) => row.id),
  );
  const missing = carcases.filter(({ row }) => !known.has(row.id));
  await recordMovements(
    tx,
    missing.map(({ row, cutout }) => ({
      carcaseId: row.id,
      fromPlace: null,
      toPlace: 'carcase' as const,
      grams: cutout.cold.grams,
      reason: 'cold weight',
      byUserId,
    })),
  );
}

function moved({ carcaseId, packId, grams }: { carcaseId: string; packId: string | null; grams: number }, by: string) {
  return { carcaseId, packId, grams, byUserId: by };
}

/** Bone, fat and loss of what was cut here: a piece that left whole took its own along. */
function mostWaste({ row, cutout }: CarcaseFigures, whole: readonly ReservedLine[]): number {
  const gone = whole.filter((line) => line.carcaseId === row.id);
  const waste = cutout.nodes
    .filter((node) => node.level === 'line' && node.kind !== 'cut' && node.kind !== 'trim')
    .filter((node) => !gone.some((line) => isWithin(node.path, line)))
    .reduce((sum, node) => sum + node.grams, 0);
  const hangingLoss = cutout.cold.grams - cutout.hung.grams;
  return waste + hangingLoss + scale(cutout.cold.grams, UNWEIGHED_PERCENT, 100);
}

function isWithin(path: string, { side, unitKind }: ReservedLine): boolean {
  const [ofSide, ...below] = path.split('/');
  return ofSide === side && (unitKind === 'side' || below.includes((unitKind ?? '').replace('primal:', '')));
}

function unweighed({ row, cutout }: CarcaseFigures, grams: number): AppError {
  return new AppError(
    'STATE_CHANGED',
    `${formatGrams(grams)} of ${formatEarTag(row.animal.earTag)} have no place yet, more than its bone, fat and loss. Weigh the packs that are left, or book them out; the day stays open.`,
    { figures: { unplacedGrams: grams, coldGrams: cutout.cold.grams } },
  );
}
