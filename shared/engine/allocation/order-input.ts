import type { ChoiceSupply, SideSupply, WayYield } from '#shared/engine/cutout/cutout-types.ts';
import type { AllocationInput, BoxVariant, LooseDemand, StockItem, TradeLine } from './allocation-input.ts';

function by<Item>(key: (item: Item) => string): (a: Item, b: Item) => number {
  return (a, b) => {
    const [left, right] = [key(a), key(b)];
    return left < right ? -1 : left > right ? 1 : 0;
  };
}

function orderWay(way: WayYield): WayYield {
  return { ...way, yields: [...way.yields].sort(by(({ primalId, cutId }) => `${primalId} ${cutId}`)) };
}

function orderChoice(choice: ChoiceSupply): ChoiceSupply {
  return {
    ...choice,
    primals: [...choice.primals].sort(by(({ primalId }) => primalId)),
    ways: choice.ways.map(orderWay).sort(by(({ wayId }) => wayId)),
  };
}

function orderSide(side: SideSupply): SideSupply {
  return { ...side, choices: side.choices.map(orderChoice).sort(by(({ choiceId }) => choiceId)) };
}

/** Steps that sell best come first; the rest of the model relies on falling values. */
function orderBox(box: BoxVariant): BoxVariant {
  return {
    ...box,
    lines: box.lines.map((line) => ({ ...line, cutIds: [...new Set(line.cutIds)].sort() })).sort(by(({ id }) => id)),
    steps: [...box.steps].sort((a, b) => b.valuePence - a.valuePence || a.boxes - b.boxes),
  };
}

function orderLoose(demand: LooseDemand): LooseDemand {
  return {
    ...demand,
    steps: [...demand.steps].sort((a, b) => b.tenthPencePerKg - a.tenthPencePerKg || a.packs - b.packs),
  };
}

function orderTrade(line: TradeLine): TradeLine {
  if (line.kind === 'cut') return line;
  return { ...line, instructions: [...line.instructions].sort(by(({ choiceId, wayId }) => `${choiceId} ${wayId}`)) };
}

/** Stock of one cut and state is one heap. */
function gatherStock(stock: readonly StockItem[]): StockItem[] {
  const heaps = new Map<string, StockItem>();
  for (const item of stock) {
    const key = `${item.cutId} ${item.state}`;
    heaps.set(key, { ...item, grams: (heaps.get(key)?.grams ?? 0) + item.grams });
  }
  return [...heaps.values()].filter(({ grams }) => grams > 0).sort(by(({ cutId, state }) => `${cutId} ${state}`));
}

/** The same input in one fixed order, so that the order in which it came never matters to the answer. */
export function orderInput(input: AllocationInput): AllocationInput {
  return {
    ...input,
    sides: input.sides.map(orderSide).sort(by(({ id }) => id)),
    cuts: [...input.cuts].sort(by(({ id }) => id)),
    stock: gatherStock(input.stock),
    boxes: input.boxes.map(orderBox).sort(by(({ id }) => id)),
    loose: input.loose.map(orderLoose).sort(by(({ cutId }) => cutId)),
    trade: input.trade.map(orderTrade).sort(by(({ id }) => id)),
    mince: input.mince && { ...input.mince, allowedCutIds: [...new Set(input.mince.allowedCutIds)].sort() },
    locks: [...input.locks].sort(by((lock) => `${lock.carcaseId}/${lock.side} ${lock.choiceId} ${lock.wayId}`)),
  };
}
