import type { Cut } from '#shared/engine/figures/specification.ts';
import type { Term } from '#shared/engine/linear/lp-model.ts';
import type { BoxVariant, LooseDemand, MeatState, MinceRule, RecipeLine } from './allocation-input.ts';
import {
  addShort,
  addTerm,
  getCut,
  heapKey,
  pencePerKg,
  stockGrams,
  type AllocationModel,
  type BoxColumns,
  type CellColumn,
  type CutLine,
  type LooseColumns,
} from './allocation-model.ts';
import { packableRange } from './check-recipe.ts';

function statesOf(line: RecipeLine): MeatState[] {
  return line.state === 'either' ? ['fresh', 'frozen'] : [line.state];
}

/** Frozen meat is only what lies in stock; fresh is what the day makes and what is at hand. */
function hasSupply(model: AllocationModel, cutId: string, state: MeatState): boolean {
  if (stockGrams(model.input, cutId, state) > 0) return true;
  return state === 'fresh' && model.yields.has(heapKey(cutId, 'fresh'));
}

/** `minPackGrams n <= grams <= maxPackGrams n` for a whole number of packs. */
function addWholePacks(model: AllocationModel, cutId: string, column: string): string {
  const cut = getCut(model, cutId);
  const packs = model.lp.addColumn(`packs_${column}`, { kind: 'integer' });
  model.lp.addRow(
    `heavy_${column}`,
    [
      [1, column],
      [-cut.minPackGrams / 1000, packs],
    ],
    ['>=', 0],
  );
  model.lp.addRow(
    `light_${column}`,
    [
      [1, column],
      [-cut.maxPackGrams / 1000, packs],
    ],
    ['<=', 0],
  );
  return packs;
}

function addCells(model: AllocationModel, line: RecipeLine, name: string): CellColumn[] {
  return line.cutIds.flatMap((cutId) =>
    statesOf(line)
      .filter((state) => hasSupply(model, cutId, state))
      .map((state) => {
        const column = model.lp.addColumn(`in_${name}_${model.namer.name('k', cutId)}_${state}`);
        addTerm(model.uses, heapKey(cutId, state), [1, column]);
        if (state === 'fresh') addTerm(model.packed, cutId, [1, column]);
        const packs = model.isPacked ? addWholePacks(model, cutId, column) : null;
        return { line, cutId, state, column, packs };
      }),
  );
}

/** Packs of at most `maxPackGrams` and at least `minPackGrams`: the counts that a line asks for bound its grams. */
function addPackRows(
  model: AllocationModel,
  cells: readonly CellColumn[],
  about: { name: string; boxes: string },
): void {
  const [first] = cells;
  const range = first && packableRange(first.line, model.cuts);
  if (!first || !range) return;
  if (model.isPacked) {
    const whole: Term[] = cells.flatMap(({ packs }) => (packs ? [[1, packs]] : []));
    model.lp.addRow(`packs_least_${about.name}`, [...whole, [-range.minPacks, about.boxes]], ['>=', 0]);
    model.lp.addRow(`packs_most_${about.name}`, [...whole, [-range.maxPacks, about.boxes]], ['<=', 0]);
    return;
  }
  const allowed = first.line.cutIds.map((id) => getCut(model, id));
  const packs = (size: 'minPackGrams' | 'maxPackGrams'): Term[] =>
    cells.map(({ cutId, column }) => [1000 / getCut(model, cutId)[size], column]);
  if (range.minPacks > 0 && range.minPacks * Math.max(...allowed.map((cut) => cut.minPackGrams)) > range.minGrams) {
    model.lp.addRow(`packs_least_${about.name}`, [...packs('minPackGrams'), [-range.minPacks, about.boxes]], ['>=', 0]);
  }
  if (range.maxPacks * Math.min(...allowed.map((cut) => cut.maxPackGrams)) < range.maxGrams) {
    model.lp.addRow(`packs_most_${about.name}`, [...packs('maxPackGrams'), [-range.maxPacks, about.boxes]], ['<=', 0]);
  }
}

function addLine(model: AllocationModel, line: RecipeLine, about: { variant: string; boxes: string }): CellColumn[] {
  const name = `${about.variant}_${model.namer.name(`l_${about.variant}`, line.id)}`;
  const cells = addCells(model, line, name);
  const range = packableRange(line, model.cuts);
  if (!range) throw new RangeError(`line ${line.id} has no whole packs`);
  const grams: Term[] = cells.map(({ column }) => [1, column]);
  model.lp.addRow(`least_${name}`, [...grams, [-range.minGrams / 1000, about.boxes]], ['>=', 0]);
  model.lp.addRow(`most_${name}`, [...grams, [-range.maxGrams / 1000, about.boxes]], ['<=', 0]);
  addPackRows(model, cells, { name, boxes: about.boxes });
  return cells;
}

function addBox(model: AllocationModel, variant: BoxVariant): void {
  const { lp } = model;
  const name = model.namer.name('b', variant.id);
  const most = variant.floor + variant.steps.reduce((sum, step) => sum + step.boxes, 0);
  const boxes = lp.addColumn(`boxes_${name}`, { cost: -variant.packagingPence, upper: most, kind: 'integer' });
  const floor = lp.addColumn(`sold_${name}`, { cost: variant.pricePence, upper: variant.floor });
  const steps = variant.steps.map((step, index) =>
    lp.addColumn(`more${index + 1}_${name}`, { cost: step.valuePence, upper: step.boxes }),
  );
  const cells = variant.lines.flatMap((line) => addLine(model, line, { variant: name, boxes }));
  const grams: Term[] = cells.map(({ column }) => [1, column]);
  lp.addRow(`guarantee_${name}`, [...grams, [-variant.guaranteedGrams / 1000, boxes]], ['>=', 0]);
  const parts: Term[] = [floor, ...steps].map((column) => [-1, column]);
  lp.addRow(`count_${name}`, [[1, boxes], ...parts], ['=', 0]);
  const short = addShort(model, {
    name: `short_box_${name}`,
    most: variant.floor,
    isWhole: true,
    priority: variant.priority,
    penceEach: Math.max(1, variant.pricePence),
  });
  lp.addRow(`floor_${name}`, [[1, floor], ...short], ['=', variant.floor]);
  const columns: BoxColumns = { variant, boxes, floor, steps, cells };
  model.boxes.push(columns);
}

/** The middle of the pack range, in grams. */
export function plannedPackGrams(cut: { minPackGrams: number; maxPackGrams: number }): number {
  return Math.round((cut.minPackGrams + cut.maxPackGrams) / 2);
}

type LooseDraft = { name: string; cut: Cut; demand: LooseDemand; packGrams: number };

/** Value of one planned pack in pence: its own rate, less what is counted on its grams already. */
function packValue(model: AllocationModel, draft: LooseDraft, rate: number): number {
  const packing = pencePerKg(model.input.packingTenthPencePerKg);
  const counted = model.isPacked ? gramValue(model, draft) : 0;
  return (pencePerKg(rate) - packing - counted) * (draft.packGrams / 1000);
}

/** With whole packs a lighter pack brings less: its grams count at the lowest rate, the rest goes by the pack. */
function gramValue(model: AllocationModel, { cut, demand }: LooseDraft): number {
  const rates = [cut.tenthPencePerKg, ...demand.steps.map(({ tenthPencePerKg }) => tenthPencePerKg)];
  return pencePerKg(Math.min(...rates)) - pencePerKg(model.input.packingTenthPencePerKg);
}

function addLooseSources(model: AllocationModel, draft: LooseDraft): LooseColumns['sources'] {
  const { cutId } = draft.demand;
  const states = (['fresh', 'frozen'] as const).filter((state) => hasSupply(model, cutId, state));
  return states.map((state) => {
    const cost = model.isPacked ? gramValue(model, draft) : 0;
    const column = model.lp.addColumn(`loose_${draft.name}_${state}`, { cost });
    addTerm(model.uses, heapKey(cutId, state), [1, column]);
    if (state === 'fresh') addTerm(model.packed, cutId, [1, column]);
    return { state, column };
  });
}

/** Grams follow packs: of the middle of the range in the plan, of any allowed weight where packs are whole. */
function addLooseGrams(
  model: AllocationModel,
  draft: LooseDraft,
  about: { packs: readonly string[]; grams: readonly Term[] },
): string | null {
  const { lp } = model;
  const { name, cut, packGrams } = draft;
  if (!model.isPacked) {
    const planned = about.packs.map((column): Term => [-packGrams / 1000, column]);
    lp.addRow(`loose_grams_${name}`, [...about.grams, ...planned], ['=', 0]);
    return null;
  }
  const whole = lp.addColumn(`loose_packs_${name}`, { kind: 'integer' });
  lp.addRow(`loose_count_${name}`, [[1, whole], ...about.packs.map((column): Term => [-1, column])], ['=', 0]);
  lp.addRow(`loose_heavy_${name}`, [...about.grams, [-cut.minPackGrams / 1000, whole]], ['>=', 0]);
  lp.addRow(`loose_light_${name}`, [...about.grams, [-cut.maxPackGrams / 1000, whole]], ['<=', 0]);
  return whole;
}

function addLoose(model: AllocationModel, demand: LooseDemand): void {
  const { lp } = model;
  const cut = getCut(model, demand.cutId);
  const name = model.namer.name('k', demand.cutId);
  const packGrams = plannedPackGrams(cut);
  const draft: LooseDraft = { name, cut, demand, packGrams };
  const floor = lp.addColumn(`loose_sold_${name}`, {
    cost: packValue(model, draft, cut.tenthPencePerKg),
    upper: demand.floor,
  });
  const steps = demand.steps.map((step, index) =>
    lp.addColumn(`loose_more${index + 1}_${name}`, {
      cost: packValue(model, draft, step.tenthPencePerKg),
      upper: step.packs,
    }),
  );
  const sources = addLooseSources(model, draft);
  const grams = sources.map(({ column }): Term => [1, column]);
  const packs = addLooseGrams(model, draft, { packs: [floor, ...steps], grams });
  const short = addShort(model, {
    name: `short_loose_${name}`,
    most: demand.floor,
    isWhole: false,
    priority: demand.priority,
    penceEach: Math.max(1, (pencePerKg(cut.tenthPencePerKg) * packGrams) / 1000),
  });
  lp.addRow(`loose_floor_${name}`, [[1, floor], ...short], ['=', demand.floor]);
  model.loose.push({ demand, packGrams, floor, steps, sources, packs });
}

function addCutLine(model: AllocationModel, line: CutLine): void {
  const name = model.namer.name('t', line.id);
  const kg = line.grams / 1000;
  const isMade = hasSupply(model, line.cutId, 'fresh');
  const column = model.lp.addColumn(`trade_${name}`, {
    cost: pencePerKg(line.tenthPencePerKg) - pencePerKg(model.input.packingTenthPencePerKg),
    upper: isMade ? kg : 0,
  });
  if (isMade) addTerm(model.uses, heapKey(line.cutId, 'fresh'), [1, column]);
  model.tradeCuts.push({ line, column });
  if (!line.isConfirmed) return;
  const short = addShort(model, {
    name: `short_${name}`,
    most: kg,
    isWhole: false,
    priority: line.priority,
    penceEach: Math.max(1, pencePerKg(line.tenthPencePerKg)),
  });
  model.lp.addRow(`ordered_${name}`, [[1, column], ...short], ['=', kg]);
}

/** Surplus of the allowed cuts may become mince, one way down, while the blend keeps its lean. Fresh meat only. */
export function addMince(model: AllocationModel, mince: MinceRule): void {
  if (mince.closedReason !== null || !model.cuts.has(mince.productCutId)) return;
  const blend: Term[] = [];
  for (const cutId of mince.allowedCutIds) {
    if (cutId === mince.productCutId || !model.cuts.has(cutId) || !hasSupply(model, cutId, 'fresh')) continue;
    const column = model.lp.addColumn(`mince_${model.namer.name('k', cutId)}`, {
      cost: -pencePerKg(mince.costTenthPencePerKg),
    });
    addTerm(model.uses, heapKey(cutId, 'fresh'), [1, column]);
    addTerm(model.yields, heapKey(mince.productCutId, 'fresh'), [1, column]);
    blend.push([(getCut(model, cutId).leanPpht - mince.minLeanPpht) / 100_000, column]);
    model.minced.push({ cutId, column });
  }
  model.lp.addRow('mince_lean', blend, ['>=', 0]);
}

/** Boxes, loose packs and cuts for the trade. */
export function addDemand(model: AllocationModel): void {
  for (const box of model.input.boxes) addBox(model, box);
  for (const demand of model.input.loose) addLoose(model, demand);
  for (const line of model.input.trade) if (line.kind === 'cut') addCutLine(model, line);
}
