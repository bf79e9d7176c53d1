import type { CuttingDayRow } from '#server/carcases/cutting-day-queries.ts';
import type { AllocationRow, NewOffer, OfferRow, ReservedLine } from './allocation-queries.ts';
import {
  findPublishedAllocation,
  listConfirmedLines,
  lockOffers,
  openDay,
  pinLine,
  putInForce,
  putOffer,
  replaceTradeOffers,
  withdrawOffers,
} from './allocation-queries.ts';
import type { Tx } from '#server/deps.ts';
import type { StockItem } from '#shared/engine/allocation/allocation-input.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { formatCount, formatWeight } from '#shared/domain/words.ts';
import { refuseShortfall } from '#shared/engine/allocation/refuse-shortfall.ts';
import { AppError } from '#shared/errors.ts';
import { frozenUse, readFrozenStock } from './frozen-stock.ts';
import { goodsOnOffer, sideOf, tradeOnOffer } from './offers-of-plan.ts';

export type Publication = { row: AllocationRow; day: CuttingDayRow; at: Date; byUserId: string | null };

/**
 * Turns an allocation into what is on sale, under the day's lock. Refuses with STATE_CHANGED when weights, reservations
 * or sales have moved since it was solved, and with NOT_FILLABLE when it does not meet what is promised already.
 */
export async function publish(tx: Tx, publication: Publication): Promise<void> {
  const { row, day, at, byUserId } = publication;
  const reserved = await refuseIfStale(tx, row, day);
  refuseUnlessFrozen(row, await readFrozenStock(tx, day.id));
  const offers = await lockOffers(tx, day.id);
  const wanted = goodsOnOffer(row);
  refuseUnlessCovered(offers, wanted);
  for (const offer of wanted) await putOffer(tx, offer);
  const keys = new Set(wanted.map((offer) => offer.productKey));
  const goods = offers.filter((offer) => offer.kind === 'box' || offer.kind === 'loose');
  await withdrawOffers(
    tx,
    goods.filter((offer) => !keys.has(offer.productKey)).map((offer) => offer.id),
  );
  await replaceTradeOffers(tx, day.id, tradeOnOffer(row, new Set(reserved.map((line) => line.id))));
  await pinWeighedLines(tx, row, reserved);
  await putInForce(tx, { id: row.id, dayId: day.id, at });
  await openDay(tx, day.id);
  await recordAudit(tx, {
    byUserId,
    action: 'published',
    subject: 'allocation',
    subjectId: row.id,
    detail: { offers: wanted.map(({ productKey, offered }) => ({ productKey, offered })) },
  });
}

/** Under the day's lock: the weights and reservations that the answer rests on are still those of the day. */
export async function refuseIfStale(tx: Tx, row: AllocationRow, day: CuttingDayRow): Promise<ReservedLine[]> {
  refuseUnlessFit(row, day);
  const reserved = await listConfirmedLines(tx, day.id);
  refuseUnlessSameReservations(row, reserved);
  return reserved;
}

function refuseUnlessFit(row: AllocationRow, day: CuttingDayRow): void {
  if (row.state === 'replaced') {
    throw new AppError(
      'STATE_CHANGED',
      'A newer allocation has replaced this one. Nothing was published; look at the newest.',
    );
  }
  if (row.figuresVersion !== day.figuresVersion) {
    throw new AppError(
      'STATE_CHANGED',
      'The weights have changed since this allocation was worked out. Nothing was published; allocate again.',
    );
  }
  if (!row.isProven) {
    throw new AppError(
      'NOT_FILLABLE',
      'This answer is not proven to be the best. Nothing was published; allocate again.',
    );
  }
  if (!row.plan.promise) {
    throw new AppError('NOT_FILLABLE', 'It is not known yet how much of this is safe to promise. Publish it again.');
  }
  const { unfillable } = row.plan.plan;
  if (unfillable) {
    throw new AppError(
      'NOT_FILLABLE',
      `Whole packs do not come out for the line '${unfillable.name}' of a box. Nothing was published; widen that line.`,
    );
  }
  refuseShortfall(row.plan.plan.shortfalls);
}

function refuseUnlessSameReservations(row: AllocationRow, reserved: readonly ReservedLine[]): void {
  const planned = row.input.input.trade.filter((line) => line.isConfirmed).map((line) => line.id);
  const now = reserved.map((line) => line.id);
  if (planned.length !== now.length || now.some((id) => !planned.includes(id))) {
    throw new AppError(
      'STATE_CHANGED',
      'A reservation came or went since this allocation was worked out. Nothing was published; allocate again.',
    );
  }
}

/** Another day, or somebody's dinner, may have taken out of the freezer what this plan counts on. */
function refuseUnlessFrozen(row: AllocationRow, stock: readonly StockItem[]): void {
  for (const [cutId, usedGrams] of frozenUse(row)) {
    const lyingGrams = stock.find((item) => item.cutId === cutId)?.grams ?? 0;
    if (usedGrams <= lyingGrams) continue;
    const name = row.input.input.cuts.find(({ id }) => id === cutId)?.name ?? cutId;
    throw new AppError(
      'STATE_CHANGED',
      `This plan counts on ${formatWeight(usedGrams)} of frozen ${name}, and only ${formatWeight(lyingGrams)} lie free. Nothing was published; allocate again.`,
      { figures: { usedGrams, lyingGrams } },
    );
  }
}

/** What is sold or held as it is now, not as it was when the solve began. */
function refuseUnlessCovered(offers: readonly OfferRow[], wanted: readonly NewOffer[]): void {
  for (const offer of offers.filter(({ kind }) => kind === 'box' || kind === 'loose')) {
    const taken = offer.held + offer.sold;
    const offered = wanted.find(({ productKey }) => productKey === offer.productKey)?.offered ?? 0;
    if (offered < taken) {
      throw new AppError(
        'STATE_CHANGED',
        `${formatCount(taken, 'piece')} of one product are sold or held and this allocation has only ${offered}. ` +
          'Nothing was published; allocate again.',
        { figures: { taken, offered } },
      );
    }
  }
}

/** Until the kill sheet the plan may exchange sides; from then on the reservation names one. */
async function pinWeighedLines(tx: Tx, row: AllocationRow, reserved: readonly ReservedLine[]): Promise<void> {
  for (const planned of row.plan.plan.trade) {
    const line = reserved.find((candidate) => candidate.id === planned.lineId);
    const unit = planned.units[0];
    if (!line || !unit || line.carcaseId) continue;
    const side = sideOf(row, unit.sideId);
    if (!row.plan.weighedCarcaseIds.includes(side.carcaseId)) continue;
    await pinLine(tx, { id: line.id, carcaseId: side.carcaseId, side: side.side });
  }
}

/** Gives up what cancelled lines had taken; their beef stays off sale until the day is worked out again. */
export async function freeTradeOffers(tx: Tx, dayId: string, lineIds: readonly string[]): Promise<void> {
  const published = await findPublishedAllocation(tx, dayId);
  if (!published) return;
  const reserved = await listConfirmedLines(tx, dayId);
  const kept = new Set(reserved.map((line) => line.id).filter((id) => !lineIds.includes(id)));
  await replaceTradeOffers(tx, dayId, tradeOnOffer(published, kept));
}
