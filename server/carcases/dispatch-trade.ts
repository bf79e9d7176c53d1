import { formatCount } from '#shared/domain/words.ts';
import { AppError } from '#shared/errors.ts';
import { listConfirmedLines, type ReservedLine } from '#server/allocation/allocation-queries.ts';
import type { Tx } from '#server/deps.ts';
import type { CarcaseFigures } from './day-figures.ts';
import { listTradePacks, markDispatched } from './dispatch-queries.ts';
import { recordMovements, type Movement } from './ledger-queries.ts';

/** What has left a carcase whole, by carcase: `left`, `right/hind`, `left/fore/brisket`. */
export type LeftWhole = ReadonlyMap<string, readonly string[]>;

type Dispatch = { dayId: string; byUserId: string; carcases: readonly CarcaseFigures[] };

/**
 * Writes down that the butchers have taken what they reserved: sides, quarters and primals out of the carcase, packs out
 * of the chiller. Refuses when a reservation has no side or no packs yet.
 */
export async function dispatchTrade(tx: Tx, { dayId, byUserId, carcases }: Dispatch): Promise<LeftWhole> {
  const lines = await listConfirmedLines(tx, dayId);
  if (lines.length === 0) return new Map();
  const packs = await listTradePacks(
    tx,
    lines.map((line) => line.id),
  );
  const movements: Movement[] = [];
  const left = new Map<string, string[]>();
  for (const line of lines) {
    const reason = `reservation ${line.reservationNo}`;
    if (line.kind === 'cut') {
      const ofLine = packs.filter((pack) => pack.lineId === line.id);
      if (ofLine.length === 0) throw notReady(line, 'has no packs yet. Fill the orders');
      const move = { fromPlace: 'chiller' as const, toPlace: 'trade' as const, reason, byUserId };
      movements.push(...ofLine.map(({ packId, carcaseId, grams }) => ({ ...move, packId, carcaseId, grams })));
      continue;
    }
    const carcase = carcases.find(({ row }) => row.id === line.carcaseId);
    const node = carcase && findUnit(carcase, line);
    if (!carcase || !node) throw notReady(line, 'has no side yet. Allocate and publish this day again');
    const carcaseId = carcase.row.id;
    movements.push({ carcaseId, fromPlace: 'carcase', toPlace: 'trade', grams: node.grams, reason, byUserId });
    left.set(carcaseId, [...(left.get(carcaseId) ?? []), node.path]);
  }
  await recordMovements(tx, movements);
  await markDispatched(tx, [...new Set(lines.map((line) => line.reservationId))]);
  return left;
}

function findUnit({ cutout }: CarcaseFigures, { side, unitKind }: ReservedLine) {
  if (!side || !unitKind) return undefined;
  const last = unitKind === 'side' ? side : unitKind.replace('primal:', '');
  return cutout.nodes.find((node) => {
    const parts = node.path.split('/');
    return node.level !== 'line' && parts[0] === side && parts.at(-1) === last;
  });
}

function notReady(line: ReservedLine, what: string): AppError {
  return new AppError(
    'STATE_CHANGED',
    `${formatCount(1, 'reservation')} is not settled yet: ${line.reservationNo} of ${line.businessName} ${what}; the day stays open.`,
    { figures: { waiting: 1 } },
  );
}
