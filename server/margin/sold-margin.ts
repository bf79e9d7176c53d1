import { priceForWeight } from '#shared/domain/money.ts';
import { apportion } from '#shared/engine/apportion.ts';
import type { AllocationInput } from '#shared/engine/allocation/allocation-input.ts';
import type { MarginEntry } from '#shared/engine/margin/margin-types.ts';
import { butcheryByCarcase, planSales } from '#shared/engine/margin/plan-sales.ts';
import { shareCarcases, type Sale } from '#shared/engine/margin/share-carcases.ts';
import { partsOfPacks, soldSales, type PaidOrder, type SoldItem } from '#shared/engine/margin/sold-sales.ts';
import { splitSale, type SalePart } from '#shared/engine/margin/split-sale.ts';
import type { AllocationRow } from '#server/allocation/allocation-queries.ts';
import type { DayCutouts } from '#server/carcases/day-figures.ts';
import type { Db, Tx } from '#server/deps.ts';
import { groupBy } from '#server/farm/group-by.ts';
import { describeReservations, sideOf } from '#server/trade/describe-reservation.ts';
import { listReservationRows } from '#server/trade/trade-queries.ts';
import type { CarcaseMoney, DayMoney } from './carcase-accounts.ts';
import type { Ledger } from './describe-margin.ts';
import {
  listPacksOfLines,
  listSoldLines,
  listSoldOrders,
  type LinePack,
  type SoldLine,
  type SoldOrder,
} from './sold-queries.ts';

export type SoldDay = { entries: MarginEntry[]; boxes: Ledger['boxes'] };
type Day = { figures: DayCutouts; row: AllocationRow; money: DayMoney };

/**
 * What a day has sold so far: orders as they were paid and refunded, reservations as they are charged. Beef that is
 * packed counts by its packs; before that by the plan's boxes and the carcases that would give each cut.
 */
export async function readSoldDay(db: Db | Tx, day: Day): Promise<SoldDay> {
  const { figures, row, money } = day;
  const { input } = row.input;
  const planned = planSales(input, row.plan.plan, money.cardFee);
  const orders = await listSoldOrders(db, figures.day.id);
  const lines = await listSoldLines(
    db,
    orders.map(({ id }) => id),
  );
  const packs = groupBy(
    await listPacksOfLines(
      db,
      lines.map(({ id }) => id),
    ),
    ({ lineId }) => lineId,
  );
  const paid = orders.map((order) => {
    const own = lines.filter(({ orderId }) => orderId === order.id);
    return paidOrder(
      order,
      own.map((line) => soldItem(line, { input, planned, packs: packs.get(line.id) ?? [] })),
    );
  });
  const sales = [...soldSales(paid, money.cardFee), ...(await tradeSales(db, day, planned))];
  const butchery = butcheryByCarcase(input, row.plan.plan);
  const accounts = money.carcases.map((carcase) => accountOf(carcase, butchery.get(carcase.carcaseId) ?? 0));
  return { entries: shareCarcases(figures.day.id, sales, accounts), boxes: soldBoxes(input, lines) };
}

function accountOf({ carcaseId, coldGrams, deadweightPence, costs }: CarcaseMoney, butcheryPence: number) {
  return { carcaseId, coldGrams, deadweightPence, costs: { ...costs, butcheryPence } };
}

/** Of a deposit order the rest counts as it stands to be paid. */
function paidOrder(order: SoldOrder, items: SoldItem[]): PaidOrder {
  const { charges, depositPence, balancePence, totalPence, deliveryPence, refundsPence } = order;
  const paidPence =
    depositPence === null
      ? charges.reduce((sum, pence) => sum + pence, 0)
      : depositPence + (balancePence ?? totalPence - depositPence);
  const carriagePence = Math.min(paidPence, deliveryPence);
  return { goodsPence: paidPence - carriagePence, carriagePence, payments: charges, refundsPence, items };
}

type Sources = { input: AllocationInput; planned: readonly Sale[]; packs: readonly LinePack[] };

function soldItem(line: SoldLine, { input, planned, packs }: Sources): SoldItem {
  const { boxKindId, cutId, quantity, unitPricePence, discountPence } = line;
  const packagingPence = input.boxes.find(({ kindId }) => kindId === boxKindId)?.packagingPence ?? 0;
  const isSame = (sale: Sale) =>
    boxKindId === null ? sale.channel === 'loose packs' && sale.cutId === cutId : sale.boxKindId === boxKindId;
  const parts =
    packs.length > 0
      ? partsOfPacks(packs, (id) => input.cuts.find((cut) => cut.id === id)?.tenthPencePerKg ?? 0)
      : plannedParts(planned.filter(isSame), quantity * line.unitGrams, cutId);
  const grams = parts.reduce((sum, part) => sum + part.grams, 0);
  const packingPence =
    boxKindId === null ? priceForWeight(grams, input.packingTenthPencePerKg) : quantity * packagingPence;
  return {
    channel: boxKindId === null ? 'loose packs' : 'boxes',
    boxKindId,
    pricePence: quantity * unitPricePence - discountPence,
    costs: { packingPence: packingPence + mincing(input, parts) },
    parts,
  };
}

function mincing({ mince }: AllocationInput, parts: readonly SalePart[]): number {
  const grams = parts.filter(({ cutId }) => cutId === mince?.productCutId).reduce((sum, part) => sum + part.grams, 0);
  return priceForWeight(grams, mince?.costTenthPencePerKg ?? 0);
}

/** What the plan makes of the same thing, at the weight that was sold. */
function plannedParts(planned: readonly Sale[], grams: number, cutId: string | null): SalePart[] {
  const weights = planned.map((sale, at) => ({ id: String(at).padStart(6, '0'), weight: sale.grams }));
  if (weights.every(({ weight }) => weight === 0)) return [{ carcaseId: null, cutId, weight: 1, grams }];
  const shares = apportion(grams, weights);
  return planned.map((sale, at) => ({
    carcaseId: sale.carcaseId,
    cutId: sale.cutId,
    weight: sale.incomePence,
    grams: shares.get(String(at).padStart(6, '0')) ?? 0,
  }));
}

/** Butchers pay by transfer: no card fee. What leaves whole is no cut and needs no packing. */
async function tradeSales(db: Db | Tx, { figures, row }: Day, planned: readonly Sale[]): Promise<Sale[]> {
  const rows = (await listReservationRows(db, null)).filter(
    ({ cuttingDayId, state }) => cuttingDayId === figures.day.id && (state === 'confirmed' || state === 'dispatched'),
  );
  const described = await describeReservations(db, rows);
  const charged = new Map(described.flatMap(({ lines }) => lines.map((line) => [line.id, line])));
  const lines = rows.flatMap((reservation) => reservation.lines);
  const packs = groupBy(
    await listPacksOfLines(
      db,
      lines.map(({ id }) => id),
    ),
    ({ lineId }) => lineId,
  );
  const { input } = row.input;
  return lines.flatMap((line): Sale[] => {
    const charge = charged.get(line.id);
    const { linePence: incomePence = 0, chargedGrams: grams = 0 } = charge ?? {};
    const sale = { channel: 'butchers', boxKindId: null, cutId: line.cutId, incomePence, grams };
    if (line.cutId === null) {
      const carcaseId = sideOf(line, { figures, published: row })?.carcaseId ?? null;
      return [{ ...sale, carcaseId, costs: {} }];
    }
    const own = packs.get(line.id) ?? [];
    const isSame = ({ channel, cutId }: Sale) => channel === 'butchers' && cutId === line.cutId;
    const parts =
      own.length > 0 ? partsOfPacks(own, () => 1_000) : plannedParts(planned.filter(isSame), grams, line.cutId);
    const packingPence = priceForWeight(grams, input.packingTenthPencePerKg) + mincing(input, parts);
    return splitSale({ ...sale, carcaseId: null, costs: { packingPence } }, parts);
  });
}

function soldBoxes(input: AllocationInput, lines: readonly SoldLine[]): Ledger['boxes'] {
  return input.boxes.map(({ kindId, name, pricePence, packagingPence }) => ({
    boxKindId: kindId,
    ...{ name, pricePence, packagingPence },
    boxes: lines.filter(({ boxKindId }) => boxKindId === kindId).reduce((sum, { quantity }) => sum + quantity, 0),
  }));
}
