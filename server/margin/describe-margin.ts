import type { BoxPrices, Costs, DayMargin, JointShare, Margin, MarginRow } from '#shared/contracts/margin.ts';
import { breakEvenBoxPrice, deadweightBoxPrice } from '#shared/engine/margin/break-even.ts';
import { groupBy } from '#server/farm/group-by.ts';
import { marginOf, sumEntries } from '#shared/engine/margin/margin.ts';
import type { CardFee, MarginDimension, MarginEntry } from '#shared/engine/margin/margin-types.ts';
import type { DayCutouts } from '#server/carcases/day-figures.ts';
import type { CarcaseMoney, DayMoney } from './carcase-accounts.ts';

const NO_COSTS: Costs = {
  killPence: 0,
  inspectionPence: 0,
  levyPence: 0,
  haulagePence: 0,
  butcheryPence: 0,
  packingPence: 0,
  deliveryPence: 0,
  cardFeesPence: 0,
  refundsPence: 0,
};

export type Ledger = {
  basis: DayMargin['basis'];
  /** What the ledger rests on, in words. */
  restsOn: string;
  entries: readonly MarginEntry[];
  /** Boxes of each kind that are planned or sold, at their price. */
  boxes: readonly { boxKindId: string; name: string; boxes: number; pricePence: number; packagingPence: number }[];
  cutName: (cutId: string) => string;
};

/** A day's ledger by every dimension, with the shares of the joint cost and the prices that follow from them. */
export function describeMargin(figures: DayCutouts, money: DayMoney, ledger: Ledger): DayMargin {
  const { entries, basis, restsOn } = ledger;
  const whole = describe(entries);
  const { edition, validFrom, grid } = money.grid;
  const boxName = (id: string) => ledger.boxes.find(({ boxKindId }) => boxKindId === id)?.name ?? id;
  const shares = shareByProduct(entries, { boxName, cutName: ledger.cutName });
  return {
    dayId: figures.day.id,
    day: figures.day.day,
    ...{ basis, restsOn, whole },
    grid: { edition, validFrom, name: grid.name, source: grid.source },
    cardFee: money.cardFee,
    carcases: figures.carcases.map(({ row, cutout }) => {
      const priced = money.carcases.find(({ carcaseId }) => carcaseId === row.id);
      return {
        carcaseId: row.id,
        earTag: row.animal.earTag,
        title: `${row.animal.breed} ${row.animal.sex}`,
        source: cutout.cold.source,
        margin: describe(entries.filter(({ carcaseId }) => carcaseId === row.id)),
        ...verdict(priced),
      };
    }),
    byBox: rowsBy(entries, 'boxKindId', (id) => (id === null ? 'In no box' : boxName(id))),
    byCut: rowsBy(entries, 'cutId', (id) => (id === null ? 'Sold whole' : ledger.cutName(id))),
    byChannel: rowsBy(entries, 'channel', (id) => (id === null ? 'Not sold' : capital(id))),
    joint: { totalPence: shares.reduce((sum, { sharePence }) => sum + sharePence, 0), shares },
    boxes: ledger.boxes.map((box) => priceBox(box, { shares, fee: money.cardFee, gainPence: whole.gainPence })),
  };
}

function verdict(priced: CarcaseMoney | undefined) {
  return { deadweight: priced?.deadweight ?? null, problem: priced?.problem ?? null };
}

function describe(entries: readonly MarginEntry[]): Margin {
  const sum = sumEntries(entries);
  return { ...marginOf(sum), coldGrams: sum.coldGrams, costs: { ...NO_COSTS, ...sum.costs } };
}

/** The lists with the most contribution first; what belongs to none stands last. */
function rowsBy(
  entries: readonly MarginEntry[],
  dimension: MarginDimension,
  nameOf: (id: string | null) => string,
): MarginRow[] {
  const rows = [...groupBy(entries, (entry) => entry[dimension])].map(([id, group]) => ({
    id,
    name: nameOf(id),
    margin: describe(group),
  }));
  return rows.sort((a, b) => {
    if ((a.id === null) !== (b.id === null)) return a.id === null ? 1 : -1;
    return b.margin.contributionPence - a.margin.contributionPence || a.name.localeCompare(b.name);
  });
}

function capital(words: string): string {
  return words.charAt(0).toUpperCase() + words.slice(1);
}

type Names = { boxName: (id: string) => string; cutName: (id: string) => string };

/** Deadweight value, kill, inspection, levy, haulage and butchery are joint; all other costs come after the split. */
function jointPence({ costs, deadweightPence }: MarginEntry): number {
  const { killPence = 0, inspectionPence = 0, levyPence = 0, haulagePence = 0, butcheryPence = 0 } = costs;
  return deadweightPence + killPence + inspectionPence + levyPence + haulagePence + butcheryPence;
}

function shareByProduct(entries: readonly MarginEntry[], { boxName, cutName }: Names): JointShare[] {
  const products = groupBy(entries, ({ boxKindId, channel, cutId }) =>
    boxKindId !== null ? `box ${boxKindId}` : `${channel ?? 'not sold'} ${cutId ?? ''}`,
  );
  return [...products].map(([id, group]) => {
    const { contributionPence, deadweightPence } = describe(group);
    const sharePence = group.reduce((sum, entry) => sum + jointPence(entry), 0);
    const [first] = group;
    const name = first?.boxKindId
      ? boxName(first.boxKindId)
      : [first?.cutId ? cutName(first.cutId) : 'Sides, quarters and primals', first?.channel ?? 'not sold'].join(', ');
    const marginPence = contributionPence - deadweightPence;
    return { id, name, netRealisablePence: marginPence + sharePence, sharePence, marginPence };
  });
}

type Pricing = { shares: readonly JointShare[]; fee: CardFee; gainPence: number };

function priceBox(box: Ledger['boxes'][number], { shares, fee, gainPence }: Pricing): BoxPrices {
  const { boxKindId, name, boxes, pricePence, packagingPence: directPence } = box;
  const share = shares.find(({ id }) => id === `box ${boxKindId}`)?.sharePence ?? 0;
  // Rounded up, so that all boxes together carry the whole of their share.
  const jointSharePence = boxes > 0 ? Math.ceil(share / boxes) : 0;
  return {
    ...{ boxKindId, name, boxes, pricePence, directPence, jointSharePence },
    breakEvenPence: breakEvenBoxPrice({ jointSharePence, directPence, fee }),
    deadweightPricePence: deadweightBoxPrice({ pricePence, boxes, gainPence, fee }),
  };
}
