import type { Term } from '#shared/engine/linear/lp-model.ts';
import type { BoxVariant, MeatState, RecipeLine } from './allocation-input.ts';
import {
  addShort,
  addTerm,
  getCut,
  hasSupply,
  heapKey,
  type AllocationModel,
  type BoxColumns,
  type CellColumn,
} from './allocation-model.ts';
import { isUsable, packableRange, packsInBox } from './check-recipe.ts';
import { addPatterns } from './model-patterns.ts';

function statesOf(line: RecipeLine): MeatState[] {
  return line.state === 'either' ? ['fresh', 'frozen'] : [line.state];
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
  const usable = line.cutIds.filter((cutId) => isUsable(line, getCut(model, cutId)));
  return usable.flatMap((cutId) =>
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

/**
 * Where three packs of a cut make the line of a box, each serves a third of one: the packs of all cuts must serve every
 * box, and must not be more than the boxes hold.
 */
function addServingRows(
  model: AllocationModel,
  cells: readonly CellColumn[],
  about: { name: string; boxes: string },
): void {
  const served = (bound: 'least' | 'most'): Term[] =>
    cells.flatMap(({ line, cutId, packs }): Term[] => {
      const count = packsInBox(line, getCut(model, cutId))[bound];
      return packs && Number.isFinite(count) ? [[1 / count, packs]] : [];
    });
  const [first] = cells;
  if (!first) return;
  if (first.line.minPacks > 0 || first.line.minGrams > 0) {
    model.lp.addRow(`serve_${about.name}`, [...served('least'), [-1, about.boxes]], ['>=', 0]);
  }
  model.lp.addRow(`hold_${about.name}`, [...served('most'), [-1, about.boxes]], ['<=', 0]);
}

/**
 * Boxes have whole counts, so some hold one pack more than others: grams stay under the line from what `count` packs can
 * weigh at most to what one more can, and over the like line of the least.
 */
function addKinks(model: AllocationModel, cells: readonly CellColumn[], about: { name: string; boxes: string }): void {
  const [first] = cells;
  const range = first && packableRange(first.line, model.cuts);
  if (!first || !range) return;
  const allowed = cells.map(({ cutId }) => getCut(model, cutId));
  const heaviest = Math.max(...allowed.map(({ maxPackGrams }) => maxPackGrams));
  const lightest = Math.min(...allowed.map(({ minPackGrams }) => minPackGrams));
  const add = (sense: '<=' | '>=', at: (count: number) => number, count: number) => {
    const slope = at(count + 1) - at(count);
    const grams = cells.map(({ column }): Term => [1000, column]);
    const packs = cells.flatMap((cell): Term[] => (cell.packs ? [[-slope, cell.packs]] : []));
    const name = `${sense === '<=' ? 'top' : 'bottom'}_${about.name}`;
    model.lp.addRow(name, [...grams, ...packs, [count * slope - at(count), about.boxes]], [sense, 0]);
  };
  add('<=', (count) => Math.min(range.maxGrams, count * heaviest), Math.floor(range.maxGrams / heaviest));
  add('>=', (count) => Math.max(range.minGrams, count * lightest), Math.floor(range.minGrams / lightest));
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
    addServingRows(model, cells, about);
    addKinks(model, cells, about);
    return;
  }
  const allowed = first.line.cutIds.map((id) => getCut(model, id)).filter((cut) => isUsable(first.line, cut));
  const packs = (size: 'minPackGrams' | 'maxPackGrams'): Term[] =>
    cells.map(({ cutId, column }) => [1000 / getCut(model, cutId)[size], column]);
  if (range.minPacks > 0 && range.minPacks * Math.max(...allowed.map((cut) => cut.minPackGrams)) > range.minGrams) {
    model.lp.addRow(`packs_least_${about.name}`, [...packs('minPackGrams'), [-range.minPacks, about.boxes]], ['>=', 0]);
  }
  if (range.maxPacks * Math.min(...allowed.map((cut) => cut.maxPackGrams)) < range.maxGrams) {
    model.lp.addRow(`packs_most_${about.name}`, [...packs('maxPackGrams'), [-range.maxPacks, about.boxes]], ['<=', 0]);
  }
}

type Filled = Pick<BoxColumns, 'cells' | 'lacks'>;

function addLine(model: AllocationModel, line: RecipeLine, about: { variant: string; boxes: string }): Filled {
  const name = `${about.variant}_${model.namer.name(`l_${about.variant}`, line.id)}`;
  const cells = addCells(model, line, name);
  const lacks = model.isElastic
    ? [{ line, column: model.lp.addColumn(`lack_${name}`, { upper: line.maxGrams / 1000 }) }]
    : [];
  const range = packableRange(line, model.cuts);
  if (!range) throw new RangeError(`line ${line.id} has no whole packs`);
  const grams: Term[] = [...cells, ...lacks].map(({ column }) => [1, column]);
  model.lp.addRow(`least_${name}`, [...grams, [-range.minGrams / 1000, about.boxes]], ['>=', 0]);
  model.lp.addRow(`most_${name}`, [...grams, [-range.maxGrams / 1000, about.boxes]], ['<=', 0]);
  if (!model.isElastic) addPackRows(model, cells, { name, boxes: about.boxes });
  return { cells, lacks };
}

/** Contents by line, grams shared over all boxes of the variant. */
function addContents(model: AllocationModel, variant: BoxVariant, about: { name: string; boxes: string }): Filled {
  const lines = variant.lines.map((line) => addLine(model, line, { variant: about.name, boxes: about.boxes }));
  const filled = { cells: lines.flatMap(({ cells }) => cells), lacks: lines.flatMap(({ lacks }) => lacks) };
  const grams: Term[] = [...filled.cells, ...filled.lacks].map(({ column }) => [1, column]);
  const guarantee: Term = [-variant.guaranteedGrams / 1000, about.boxes];
  model.lp.addRow(`guarantee_${about.name}`, [...grams, guarantee], ['>=', 0]);
  return filled;
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
  const patterns = model.patterns?.get(variant.id);
  const filled = patterns ? { cells: [], lacks: [] } : addContents(model, variant, { name, boxes });
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
  const columns: BoxColumns = { variant, boxes, floor, steps, ...filled, patterns: [] };
  if (patterns) columns.patterns = addPatterns(model, { variant, name, boxes, patterns });
  model.boxes.push(columns);
}

export function addBoxes(model: AllocationModel): void {
  for (const box of model.input.boxes) addBox(model, box);
}
