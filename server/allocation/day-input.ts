import type {
  AllocationInput,
  BoxVariant,
  LooseDemand,
  Priority,
  StockItem,
  TradeLine,
  WayLock,
} from '#shared/engine/allocation/allocation-input.ts';
import type { SideSupply } from '#shared/engine/cutout/cutout-types.ts';
import type { Cut, Specification } from '#shared/engine/figures/specification.ts';
import { parseUnitKind } from '#shared/domain/trade-unit.ts';
import { scale } from '#shared/engine/rounding.ts';
import { priceForWeight } from '#shared/domain/money.ts';
import type { BoxKindRow, CutRow, OfferRow, ReservedLine } from './allocation-queries.ts';

/** Film, tray, label and labour of a loose or trade kilogram, in tenths of a penny: common practice. */
const PACKING_TENTH_PENCE_PER_KG = 600;
/** Mincing and packing of a kilogram, in tenths of a penny: common practice. */
const MINCING_TENTH_PENCE_PER_KG = 700;
/** Visual lean of the farm's mince, in parts per 100,000: common practice. */
const MINCE_LEAN_PPHT = 85_000;
/** Beyond the expected demand a quarter more will sell, at four fifths of the price: common practice. */
const FURTHER_DEMAND_PERCENT = 25;
const FURTHER_VALUE_PERCENT = 80;

export type DayRows = {
  sides: readonly SideSupply[];
  specification: Specification;
  cuts: readonly CutRow[];
  kinds: readonly BoxKindRow[];
  offers: readonly OfferRow[];
  reserved: readonly ReservedLine[];
  /** Wished for, not promised: whatever is promised comes first. */
  asked: readonly ReservedLine[];
  locks: readonly WayLock[];
  stock: readonly StockItem[];
  /** Plain boning and cutting, in tenths of a penny per kg of primal. */
  butcheryTenthPencePerKg: number;
  /** Why meat of this day may not be minced, or null. */
  minceClosedReason: string | null;
};

/** One cutting day as the engine's question: what is sold or held is a floor, confirmed reservations are fixed. */
export function buildDayInput(rows: DayRows): AllocationInput {
  const cuts = mergeCuts(rows.specification, rows.cuts);
  const known = new Set(cuts.map((cut) => cut.id));
  const mince = cuts.find((cut) => cut.kind === 'mince');
  return {
    sides: rows.sides.map((side) => addBoning(side, rows.butcheryTenthPencePerKg)),
    cuts,
    stock: rows.stock.filter(({ cutId }) => known.has(cutId)),
    boxes: rows.kinds.map((kind) => toVariant(kind, known, takenOf(rows.offers, `box:${kind.id}`))).filter(isWanted),
    loose: cuts
      .filter((cut) => cut.isSoldLoose)
      .map((cut) => toLoose(cut, rows.cuts, takenOf(rows.offers, `loose:${cut.id}`))),
    trade: [
      ...rows.reserved.map((line) => toTradeLine(line, { specification: rows.specification, priority: 1 })),
      ...rows.asked.map((line) => toTradeLine(line, { specification: rows.specification, priority: 3 })),
    ],
    mince: mince
      ? {
          closedReason: rows.minceClosedReason,
          productCutId: mince.id,
          minLeanPpht: MINCE_LEAN_PPHT,
          costTenthPencePerKg: MINCING_TENTH_PENCE_PER_KG,
          allowedCutIds: cuts.filter((cut) => cut.mayBeMinced && cut.id !== mince.id).map((cut) => cut.id),
        }
      : null,
    locks: rows.locks,
    packingTenthPencePerKg: PACKING_TENTH_PENCE_PER_KG,
  };
}

/** Sold and held together: no offer may fall below it. */
export function takenOf(offers: readonly OfferRow[], productKey: string): number {
  const found = offers.find((offer) => offer.productKey === productKey);
  return found ? found.held + found.sold : 0;
}

/** The specification says what a cut is; prices and packs are the farm's own and may have been edited since. */
function mergeCuts(specification: Specification, rows: readonly CutRow[]): Cut[] {
  return specification.cuts.map((cut) => {
    const row = rows.find((candidate) => candidate.id === cut.id);
    if (!row) return cut;
    return {
      ...cut,
      name: row.name,
      tenthPencePerKg: row.tenthPencePerKg,
      clearanceTenthPencePerKg: row.clearanceTenthPencePerKg,
      minPackGrams: row.minPackGrams,
      maxPackGrams: row.maxPackGrams,
      isSoldLoose: row.isSoldLoose,
    };
  });
}

function addBoning(side: SideSupply, rate: number): SideSupply {
  return {
    ...side,
    choices: side.choices.map((choice) => {
      const grams = choice.primals.reduce((sum, primal) => sum + primal.grams, 0);
      const boningPence = priceForWeight(grams, rate);
      return { ...choice, ways: choice.ways.map((way) => ({ ...way, costPence: way.costPence + boningPence })) };
    }),
  };
}

function toVariant(kind: BoxKindRow, known: ReadonlySet<string>, floor: number): BoxVariant & { isActive: boolean } {
  const further = scale(kind.demandBoxes, FURTHER_DEMAND_PERCENT, 100);
  return {
    id: kind.id,
    kindId: kind.id,
    name: kind.name,
    pricePence: kind.pricePence,
    packagingPence: kind.packagingPence,
    guaranteedGrams: kind.guaranteedGrams,
    lines: kind.lines.map((line) => ({
      id: line.id,
      name: line.name,
      // A recipe may name cuts that the day's specification does not give.
      cutIds: line.cutIds.filter((cutId) => known.has(cutId)),
      minGrams: line.minGrams,
      maxGrams: line.maxGrams,
      minPacks: line.minPacks,
      maxPacks: line.maxPacks,
      state: 'either',
    })),
    floor,
    priority: 2,
    steps: [
      { boxes: Math.max(0, kind.demandBoxes - floor), valuePence: kind.pricePence },
      { boxes: further, valuePence: scale(kind.pricePence, FURTHER_VALUE_PERCENT, 100) },
    ].filter((step) => step.boxes > 0),
    isActive: kind.isActive,
  };
}

/** A kind that is off sale stays in the plan while boxes of it are sold. */
function isWanted(variant: BoxVariant & { isActive: boolean }): boolean {
  return variant.isActive || variant.floor > 0;
}

function toLoose(cut: Cut, rows: readonly CutRow[], floor: number): LooseDemand {
  const demand = rows.find((row) => row.id === cut.id)?.looseDemandPacks ?? 0;
  const further = scale(demand, FURTHER_DEMAND_PERCENT, 100);
  return {
    cutId: cut.id,
    floor,
    priority: 2,
    steps: [
      { packs: Math.max(0, demand - floor), tenthPencePerKg: cut.tenthPencePerKg },
      { packs: further, tenthPencePerKg: scale(cut.tenthPencePerKg, FURTHER_VALUE_PERCENT, 100) },
    ].filter((step) => step.packs > 0),
  };
}

function nameUnit(unitKind: string, { quarters }: Specification): string {
  const unit = parseUnitKind(unitKind);
  if (unit.kind === 'side') return 'Side';
  if (unit.kind === 'quarter') return quarters.find((quarter) => quarter.id === unit.quarter)?.name ?? unit.quarter;
  const primals = quarters.flatMap((quarter) => quarter.primals);
  return primals.find((primal) => primal.id === unit.primalId)?.name ?? unit.primalId;
}

type TradeFacts = { specification: Specification; priority: Priority };

function toTradeLine(line: ReservedLine, { specification, priority }: TradeFacts): TradeLine {
  const shared = {
    id: line.id,
    tenthPencePerKg: line.tenthPencePerKg,
    isConfirmed: true,
    priority,
  };
  if (line.cutId !== null) {
    const name = specification.cuts.find((cut) => cut.id === line.cutId)?.name ?? line.cutId;
    return { ...shared, name: `${name}, ${line.businessName}`, kind: 'cut', cutId: line.cutId, grams: line.grams ?? 0 };
  }
  return {
    ...shared,
    name: `${nameUnit(line.unitKind ?? 'side', specification)}, ${line.businessName}`,
    kind: 'unit',
    unit: parseUnitKind(line.unitKind ?? 'side'),
    quantity: 1,
    fit: {
      carcaseId: line.carcaseId,
      side: line.side,
      minSideGrams: null,
      maxSideGrams: null,
      conformations: null,
      fatClasses: null,
      minHangingDays: null,
    },
    instructions: [],
  };
}
