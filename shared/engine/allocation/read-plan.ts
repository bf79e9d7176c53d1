import { priceForWeight } from '#shared/domain/money.ts';
import type { Solution } from '#shared/engine/linear/solve.ts';
import type { BoxVariant, LooseDemand, MeatState, RecipeLine } from './allocation-input.ts';
import { getCut, type AllocationModel, type BoxColumns, type LooseColumns } from './allocation-model.ts';
import type {
  AllocationPlan,
  CutBalance,
  PlannedBox,
  PlannedLoose,
  PlannedTrade,
  Shortfall,
} from './allocation-plan.ts';
import { dealBoxes, dealPattern, type Cell, type PlannedContents } from './deal-packs.ts';
import { Heaps } from './heaps.ts';
import { readFates, type Fates } from './read-fates.ts';
import { sharePacks } from './share-packs.ts';
import { finishBoxes } from './whole-boxes.ts';

export type Draft = Pick<
  AllocationPlan,
  'fates' | 'boxes' | 'loose' | 'trade' | 'cuts' | 'shortfalls' | 'money' | 'contributionPence'
> & {
  failures: { variant: BoxVariant; line: RecipeLine }[];
  /** Box by box, as dealt and levelled. */
  dealt: Map<string, readonly PlannedContents[]>;
};
type Reading = { model: AllocationModel; solution: Solution; heaps: Heaps; balances: Map<string, CutBalance> };

function value(reading: Reading, column: string): number {
  return reading.solution.columns[column] ?? 0;
}

/** Kilograms of the answer as whole grams; what a solver's tolerance leaves open is less than a tenth of a gram. */
function wholeGrams(reading: Reading, column: string): number {
  return Math.max(0, Math.floor(value(reading, column) * 1000 + 0.1));
}

function balanceOf(reading: Reading, cutId: string): CutBalance {
  const known = reading.balances.get(cutId);
  if (known) return known;
  const empty = {
    cutId,
    madeGrams: 0,
    stockGrams: 0,
    boxGrams: 0,
    looseGrams: 0,
    tradeGrams: 0,
    mincedGrams: 0,
    leftGrams: 0,
  };
  reading.balances.set(cutId, empty);
  return empty;
}

function addStock(reading: Reading): void {
  for (const { id } of reading.model.input.cuts) {
    const made = reading.heaps.get(id, 'fresh');
    if (made > 0) balanceOf(reading, id).madeGrams = made;
  }
  for (const { cutId, state, grams } of reading.model.input.stock) {
    reading.heaps.add(cutId, state, grams);
    balanceOf(reading, cutId).stockGrams += grams;
  }
}

function readTradeCuts(reading: Reading): PlannedTrade[] {
  return reading.model.tradeCuts.map(({ line, column }) => {
    const wanted = Math.min(line.grams, Math.round(value(reading, column) * 1000));
    const cutGrams = reading.heaps.take(line.cutId, 'fresh', wanted);
    balanceOf(reading, line.cutId).tradeGrams += cutGrams;
    return {
      lineId: line.id,
      name: line.name,
      units: [],
      cutGrams,
      short: line.isConfirmed ? line.grams - cutGrams : 0,
      incomePence: priceForWeight(cutGrams, line.tenthPencePerKg),
    };
  });
}

function readTradeUnits(reading: Reading, { sold }: Fates): PlannedTrade[] {
  return reading.model.input.trade.flatMap((line): PlannedTrade[] => {
    if (line.kind !== 'unit') return [];
    const units = sold
      .filter((unit) => unit.line.id === line.id)
      .map(({ side, grams, incomePence }) => ({ unit: line.unit, sideId: side.id, grams, incomePence }));
    const incomePence = units.reduce((sum, unit) => sum + unit.incomePence, 0);
    const short = line.isConfirmed ? line.quantity - units.length : 0;
    return [{ lineId: line.id, name: line.name, units, cutGrams: 0, short, incomePence }];
  });
}

/** Minces what the answer says while every cut lasts; returns the grams. The blend is the answer's, so its lean holds. */
function readMince(reading: Reading): number {
  const { mince } = reading.model.input;
  if (!mince) return 0;
  let total = 0;
  for (const { cutId, column } of reading.model.minced) {
    const taken = reading.heaps.take(cutId, 'fresh', Math.round(value(reading, column) * 1000));
    balanceOf(reading, cutId).mincedGrams += taken;
    total += taken;
  }
  if (total === 0) return 0;
  reading.heaps.add(mince.productCutId, 'fresh', total);
  balanceOf(reading, mince.productCutId).madeGrams += total;
  return total;
}

function readLoose(reading: Reading, columns: LooseColumns): PlannedLoose {
  const { demand, sources } = columns;
  const cut = getCut(reading.model, demand.cutId);
  const packs = columns.packs ? Math.round(value(reading, columns.packs)) : 0;
  let open = packs * cut.maxPackGrams;
  let grams = 0;
  for (const { state, column } of sources) {
    const part = reading.heaps.take(demand.cutId, state, Math.min(open, wholeGrams(reading, column)));
    open -= part;
    grams += part;
  }
  balanceOf(reading, demand.cutId).looseGrams += grams;
  return {
    cutId: demand.cutId,
    packs,
    grams,
    short: Math.max(0, demand.floor - packs),
    incomePence: looseIncome(demand, { packs, grams, tenthPencePerKg: cut.tenthPencePerKg }),
  };
}

/** Sold packs at the list price, then each step at its own rate. */
function looseIncome(demand: LooseDemand, made: { packs: number; grams: number; tenthPencePerKg: number }): number {
  const steps = [
    { count: demand.floor, rate: made.tenthPencePerKg },
    ...demand.steps.map((step) => ({ count: step.packs, rate: step.tenthPencePerKg })),
  ];
  return sharePacks(made, steps).reduce((sum, { grams, rate }) => sum + priceForWeight(grams, rate), 0);
}

function boxIncome(variant: BoxVariant, boxes: number): number {
  let open = Math.max(0, boxes - variant.floor);
  let pence = Math.min(boxes, variant.floor) * variant.pricePence;
  for (const step of variant.steps) {
    const count = Math.min(open, step.boxes);
    pence += count * step.valuePence;
    open -= count;
  }
  return pence;
}

type Planned = { line: RecipeLine; cutId: string; state: MeatState; column: string; packs: number };

/** Takes the grams of a cell off its heap; what the whole packs do not hold stays there. */
function takeCell(reading: Reading, { line, cutId, state, column, packs }: Planned): Cell {
  const cut = getCut(reading.model, cutId);
  const wanted = Math.min(wholeGrams(reading, column), packs * cut.maxPackGrams);
  return { line, cut, state, packs, grams: reading.heaps.take(cutId, state, wanted) };
}

/** Sets the packs of every box aside first, so that what is left on the heaps is spare for all of them. */
function setAside(reading: Reading, columns: BoxColumns): PlannedContents[] {
  const count = (column: string | null) => (column ? Math.round(value(reading, column)) : 0);
  if (columns.patterns.length === 0) {
    const cells = columns.cells.map((cell) => takeCell(reading, { ...cell, packs: count(cell.packs) }));
    return dealBoxes(columns.variant.lines, cells, count(columns.boxes));
  }
  return columns.patterns.flatMap(({ pattern, boxes, grams }) => {
    const made = count(boxes);
    const cells = pattern.map((cell, index) =>
      takeCell(reading, { ...cell, packs: cell.packs * made, column: grams[index] ?? '' }),
    );
    return made > 0 ? dealPattern(cells, made) : [];
  });
}

function readBoxes(
  reading: Reading,
  asides: readonly PlannedContents[][],
): { boxes: PlannedBox[]; failures: Draft['failures'] } {
  const failures: Draft['failures'] = [];
  const boxes = reading.model.boxes.map(({ variant }, index): PlannedBox => {
    const dealt = asides[index] ?? [];
    const { contents, failedLine } = finishBoxes(variant, dealt, { cuts: reading.model.cuts, heaps: reading.heaps });
    if (failedLine) failures.push({ variant, line: failedLine });
    for (const { cutId, grams } of contents) balanceOf(reading, cutId).boxGrams += grams;
    return {
      variantId: variant.id,
      kindId: variant.kindId,
      name: variant.name,
      boxes: dealt.length,
      short: Math.max(0, variant.floor - dealt.length),
      contents,
      incomePence: boxIncome(variant, dealt.length),
    };
  });
  return { boxes, failures };
}

function listShortfalls(model: AllocationModel, plan: Pick<Draft, 'boxes' | 'loose' | 'trade'>): Shortfall[] {
  const boxes = model.input.boxes.map((box, index): Shortfall => {
    const short = plan.boxes[index]?.short ?? 0;
    return { kind: 'box', id: box.id, name: box.name, priority: box.priority, short, unit: 'boxes' };
  });
  const loose = model.input.loose.map(({ cutId, priority }, index): Shortfall => {
    const short = plan.loose[index]?.short ?? 0;
    return { kind: 'loose', id: cutId, name: getCut(model, cutId).name, priority, short, unit: 'packs' };
  });
  const trade = model.input.trade.map((line): Shortfall => {
    const short = plan.trade.find(({ lineId }) => lineId === line.id)?.short ?? 0;
    const unit = line.kind === 'unit' ? 'units' : 'grams';
    return { kind: 'trade', id: line.id, name: line.name, priority: line.priority, short, unit };
  });
  return [...boxes, ...loose, ...trade].filter(({ short }) => short > 0).sort((a, b) => a.priority - b.priority);
}

/** Clearance value of what nothing took; closes every cut's balance. */
function readLeft(reading: Reading): number {
  let pence = 0;
  for (const { cutId, state } of reading.model.left) {
    const grams = reading.heaps.get(cutId, state);
    const balance = balanceOf(reading, cutId);
    balance.leftGrams += grams;
    if (state === 'frozen') balance.leftStockGrams = (balance.leftStockGrams ?? 0) + grams;
    pence += priceForWeight(grams, getCut(reading.model, cutId).clearanceTenthPencePerKg);
  }
  return pence;
}

/** The whole-number plan of an answer: packs, boxes, grams and pence. */
export function readPlan(model: AllocationModel, solution: Solution): Draft {
  const { input } = model;
  const reading: Reading = { model, solution, heaps: new Heaps(), balances: new Map() };
  const fates = readFates(model, solution, reading.heaps);
  addStock(reading);
  const cutLines = readTradeCuts(reading);
  const trade = [...readTradeUnits(reading, fates), ...cutLines].sort((a, b) => (a.lineId < b.lineId ? -1 : 1));
  const mincedGrams = readMince(reading);
  const asides = model.boxes.map((columns) => setAside(reading, columns));
  const loose = model.loose.map((columns) => readLoose(reading, columns));
  const { boxes, failures } = readBoxes(reading, asides);
  const clearancePence = readLeft(reading);
  const sum = (parts: readonly { incomePence: number }[]) => parts.reduce((all, part) => all + part.incomePence, 0);
  const packedGrams = [...loose.map(({ grams }) => grams), ...cutLines.map(({ cutGrams }) => cutGrams)];
  const money = {
    boxPence: sum(boxes),
    loosePence: sum(loose),
    tradePence: sum(trade),
    clearancePence,
    packagingPence: input.boxes.reduce((all, box, index) => all + box.packagingPence * (boxes[index]?.boxes ?? 0), 0),
    packingPence: priceForWeight(
      packedGrams.reduce((all, grams) => all + grams, 0),
      input.packingTenthPencePerKg,
    ),
    butcheryPence: fates.butcheryPence,
    mincingPence: priceForWeight(mincedGrams, input.mince?.costTenthPencePerKg ?? 0),
  };
  const income = money.boxPence + money.loosePence + money.tradePence + money.clearancePence;
  const costs = money.packagingPence + money.packingPence + money.butcheryPence + money.mincingPence;
  const plan = { boxes, loose, trade };
  return {
    fates: fates.fates,
    ...plan,
    cuts: [...reading.balances.values()].sort((a, b) => (a.cutId < b.cutId ? -1 : 1)),
    shortfalls: listShortfalls(model, plan),
    money,
    contributionPence: income - costs,
    failures,
    dealt: new Map(model.boxes.map(({ variant }, index) => [variant.id, asides[index] ?? []])),
  };
}
