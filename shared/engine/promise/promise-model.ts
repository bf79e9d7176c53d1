import type { AllocationInput, BoxVariant, MeatState } from '#shared/engine/allocation/allocation-input.ts';
import type { AllocationPlan } from '#shared/engine/allocation/allocation-plan.ts';
import { packableRange } from '#shared/engine/allocation/check-recipe.ts';
import type { Cut } from '#shared/engine/figures/specification.ts';
import { LpModel, type Term } from '#shared/engine/linear/lp-model.ts';
import { Namer } from '#shared/engine/linear/namer.ts';
import type { RowChange } from '#shared/engine/linear/solve.ts';
import { supplyKey, type Supply } from './scenarios.ts';

/** One thing on sale: boxes of a variant or loose packs of a cut. */
export type Offer = {
  kind: 'box' | 'loose';
  id: string;
  /** Of the plan. */
  planned: number;
  /** Sold and held. */
  floor: number;
  pricePence: number;
  gramsEach: number;
};

export const mostOf = (offer: Offer) => Math.max(offer.planned, offer.floor);

/** Boxes before loose packs, dearest first: the order in which offers are raised. */
export function listOffers(input: AllocationInput, plan: AllocationPlan): Offer[] {
  const boxes = input.boxes.map((variant): Offer => {
    const planned = plan.boxes.find(({ variantId }) => variantId === variant.id)?.boxes ?? 0;
    const { id, floor, pricePence, guaranteedGrams } = variant;
    return { kind: 'box', id, planned, floor, pricePence, gramsEach: guaranteedGrams };
  });
  const loose = input.loose.map(({ cutId, floor }): Offer => {
    const planned = plan.loose.find((one) => one.cutId === cutId);
    const cut = input.cuts.find(({ id }) => id === cutId);
    const usual = cut ? (cut.minPackGrams + cut.maxPackGrams) / 2 : 0;
    const gramsEach = planned && planned.packs > 0 ? planned.grams / planned.packs : usual;
    return { kind: 'loose', id: cutId, planned: planned?.packs ?? 0, floor, pricePence: 0, gramsEach };
  });
  const ids = (a: Offer, b: Offer) => (a.id < b.id ? -1 : 1);
  return [...boxes.sort((a, b) => b.pricePence - a.pricePence || ids(a, b)), ...loose.sort(ids)].filter(
    (offer) => mostOf(offer) > 0,
  );
}

export type PromiseQuestion =
  /** The largest share of the plan's offers, nothing below what is sold and held. */
  | { find: 'share' }
  /** The most of one offer while the others stand at these counts. */
  | { find: 'most'; offer: Offer; counts: ReadonlyMap<Offer, number> }
  /** The fewest grams that are missing for what is sold and held. */
  | { find: 'shortfall' };

const STATES = ['fresh', 'frozen'] as const satisfies readonly MeatState[];

type Draft = {
  lp: LpModel;
  namer: Namer;
  cuts: ReadonlyMap<string, Cut>;
  uses: Map<string, Term[]>;
};

function addUse({ uses }: Draft, key: string, term: Term): void {
  uses.set(key, [...(uses.get(key) ?? []), term]);
}

function addBox(draft: Draft, variant: BoxVariant, boxes: string): void {
  const { lp, namer } = draft;
  const all: Term[] = [];
  for (const line of variant.lines) {
    const name = `${boxes}_${namer.name(boxes, line.id)}`;
    const range = packableRange(line, draft.cuts) ?? line;
    const cells = line.cutIds.flatMap((cutId) =>
      STATES.filter((state) => line.state === 'either' || line.state === state).map((state): Term => {
        const column = lp.addColumn(`in_${name}_${namer.name('k', cutId)}_${state}`);
        addUse(draft, supplyKey(cutId, state), [1, column]);
        return [1, column];
      }),
    );
    lp.addRow(`least_${name}`, [...cells, [-range.minGrams / 1000, boxes]], ['>=', 0]);
    lp.addRow(`most_${name}`, [...cells, [-range.maxGrams / 1000, boxes]], ['<=', 0]);
    all.push(...cells);
  }
  lp.addRow(`guarantee_${boxes}`, [...all, [-variant.guaranteedGrams / 1000, boxes]], ['>=', 0]);
}

function addLoose(draft: Draft, offer: Offer, packs: string): void {
  const each = STATES.map((state): Term => {
    const column = draft.lp.addColumn(`${packs}_${state}`);
    addUse(draft, supplyKey(offer.id, state), [1, column]);
    return [1, column];
  });
  draft.lp.addRow(`weigh_${packs}`, [...each, [-offer.gramsEach / 1000, packs]], ['>=', 0]);
}

/** Mincing stays open in every scenario: what is short of mince may be made of what is not short. */
function addMince(draft: Draft, { mince }: AllocationInput): void {
  if (!mince || mince.closedReason !== null) return;
  const lean: Term[] = [];
  for (const cutId of mince.allowedCutIds) {
    const cut = draft.cuts.get(cutId);
    if (!cut || cutId === mince.productCutId) continue;
    const column = draft.lp.addColumn(`mince_${draft.namer.name('k', cutId)}`);
    addUse(draft, supplyKey(cutId, 'fresh'), [1, column]);
    addUse(draft, supplyKey(mince.productCutId, 'fresh'), [-1, column]);
    lean.push([(cut.leanPpht - mince.minLeanPpht) / 100_000, column]);
  }
  draft.lp.addRow('mince_lean', lean, ['>=', 0]);
}

function lowestOf(offer: Offer, question: PromiseQuestion): number {
  return question.find === 'most' ? (question.counts.get(offer) ?? 0) : offer.floor;
}

export type PromiseModel = { lpText: string; changesOf: (supply: Supply) => RowChange[]; countColumn: string };

/**
 * The linear program of one scenario, ways and unit sales as planned; weights in kilograms. `changesOf` puts the
 * scenario's supply into its rows. What confirmed trade lines take of a cut is set aside first.
 */
export function buildPromiseModel(
  { input, plan }: { input: AllocationInput; plan: AllocationPlan },
  offers: readonly Offer[],
  question: PromiseQuestion,
): PromiseModel {
  const lp = new LpModel();
  const draft: Draft = {
    lp,
    namer: new Namer(),
    cuts: new Map(input.cuts.map((cut) => [cut.id, cut])),
    uses: new Map(),
  };
  if (question.find === 'share') lp.addColumn('share', { cost: 1, upper: 1 });
  let countColumn = 'share';
  for (const offer of offers) {
    const column = `n_${draft.namer.name(offer.kind, offer.id)}_${offer.kind}`;
    const isAsked = question.find === 'most' && question.offer === offer;
    if (isAsked) countColumn = column;
    const upper = Math.max(mostOf(offer), lowestOf(offer, question));
    lp.addColumn(column, { cost: isAsked ? 1 : 0, lower: isAsked ? 0 : lowestOf(offer, question), upper });
    if (question.find === 'share') {
      lp.addRow(
        `part_${column}`,
        [
          [1, column],
          [-offer.planned, 'share'],
        ],
        ['>=', 0],
      );
    }
    const variant = input.boxes.find(({ id }) => offer.kind === 'box' && id === offer.id);
    if (variant) addBox(draft, variant, column);
    else addLoose(draft, offer, column);
  }
  addMince(draft, input);
  const rows = addSupplyRows(draft, question);
  const setAside = tradeGrams(input, plan);
  const changesOf = (supply: Supply): RowChange[] =>
    rows.map(({ row, key }) => {
      const grams = (supply.get(key) ?? 0) - (setAside.get(key) ?? 0);
      return { row, lower: -Infinity, upper: grams / 1000 };
    });
  const sense = question.find === 'shortfall' ? 'Minimize' : 'Maximize';
  return { lpText: lp.write({ sense }), changesOf, countColumn };
}

function addSupplyRows({ lp, namer, uses }: Draft, question: PromiseQuestion): { row: string; key: string }[] {
  return [...uses].map(([key, terms]) => {
    const row = `supply_${namer.name('s', key)}`;
    const short: Term[] =
      question.find === 'shortfall' ? [[-1, lp.addColumn(`short_${namer.name('s', key)}`, { cost: 1 })]] : [];
    lp.addRow(row, [...terms, ...short], ['<=', 0]);
    return { row, key };
  });
}

/** Grams of cuts that confirmed trade lines take, fresh first. */
function tradeGrams(input: AllocationInput, plan: AllocationPlan): Map<string, number> {
  const grams = new Map<string, number>();
  for (const line of input.trade) {
    if (line.kind !== 'cut' || !line.isConfirmed) continue;
    const taken = plan.trade.find(({ lineId }) => lineId === line.id)?.cutGrams ?? 0;
    const key = supplyKey(line.cutId, 'fresh');
    grams.set(key, (grams.get(key) ?? 0) + taken);
  }
  return grams;
}
