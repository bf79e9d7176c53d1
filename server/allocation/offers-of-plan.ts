import { toUnitKind } from '#shared/domain/trade-unit.ts';
import { priceForWeight } from '#shared/domain/money.ts';
import type { AllocationRow, NewOffer } from './allocation-queries.ts';

/** Boxes and loose packs, as many as can be filled with the chosen confidence. */
export function goodsOnOffer(row: AllocationRow): NewOffer[] {
  const { input } = row.input;
  const { plan, promise } = row.plan;
  const boxes = plan.boxes.map((box): NewOffer => {
    const variant = input.boxes.find((candidate) => candidate.id === box.variantId);
    return {
      cuttingDayId: row.cuttingDayId,
      kind: 'box',
      productKey: `box:${box.kindId}`,
      boxKindId: box.kindId,
      offered: promise?.boxes.find((each) => each.variantId === box.variantId)?.promised ?? box.boxes,
      pricePence: variant?.pricePence ?? null,
      upperGrams: variant?.guaranteedGrams ?? null,
    };
  });
  const loose = plan.loose.map((item): NewOffer => {
    const cut = input.cuts.find((candidate) => candidate.id === item.cutId);
    const upperGrams = cut?.upperLooseGrams ?? 0;
    return {
      cuttingDayId: row.cuttingDayId,
      kind: 'loose',
      productKey: `loose:${item.cutId}`,
      cutId: item.cutId,
      offered: promise?.loose.find((each) => each.cutId === item.cutId)?.promised ?? item.packs,
      pricePence: priceForWeight(upperGrams, cut?.tenthPencePerKg ?? 0),
      upperGrams,
    };
  });
  return [...boxes, ...loose.filter((offer) => (offer.pricePence ?? 0) > 0)];
}

/** A confirmed reservation is sold: each unit once, each cut in grams. */
export function tradeOnOffer(row: AllocationRow, lineIds: ReadonlySet<string>): NewOffer[] {
  const { plan } = row.plan;
  const kept = plan.trade.filter((line) => lineIds.has(line.lineId));
  const units = kept.flatMap((line) =>
    line.units.map((unit): NewOffer => {
      const side = sideOf(row, unit.sideId);
      const name = `${side.side}:${toUnitKind(unit.unit)}`;
      return {
        cuttingDayId: row.cuttingDayId,
        kind: 'unit',
        productKey: `unit:${side.carcaseId}:${name}`,
        carcaseId: side.carcaseId,
        unit: name,
        offered: 1,
        sold: 1,
      };
    }),
  );
  const grams = new Map<string, number>();
  for (const line of row.input.input.trade) {
    const planned = kept.find((candidate) => candidate.lineId === line.id);
    if (line.kind === 'cut') grams.set(line.cutId, (grams.get(line.cutId) ?? 0) + (planned?.cutGrams ?? 0));
  }
  const cuts = [...grams]
    .filter(([, sold]) => sold > 0)
    .map(([cutId, sold]): NewOffer => ({
      cuttingDayId: row.cuttingDayId,
      kind: 'cut',
      productKey: `cut:${cutId}`,
      cutId,
      offered: sold,
      sold,
    }));
  return [...units, ...cuts];
}

export function sideOf(row: AllocationRow, sideId: string) {
  const side = row.input.input.sides.find((candidate) => candidate.id === sideId);
  if (!side) throw new Error(`the plan names a side ${sideId} that its input lacks`);
  return side;
}
