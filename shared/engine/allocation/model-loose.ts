import type { Cut } from '#shared/engine/figures/specification.ts';
import type { Term } from '#shared/engine/linear/lp-model.ts';
import type { LooseDemand } from './allocation-input.ts';
import {
  addShort,
  addTerm,
  getCut,
  hasSupply,
  heapKey,
  pencePerKg,
  type AllocationModel,
  type LooseColumns,
} from './allocation-model.ts';

type Step = { packs: string; grams: string };
type LooseDraft = { name: string; cut: Cut; demand: LooseDemand };

/** Packs that sell at one rate, and their grams: any weight that the cut's packs may have. */
function addStep(
  model: AllocationModel,
  { name, cut }: LooseDraft,
  about: { step: string; packs: number; tenthPencePerKg: number },
): Step {
  const { lp } = model;
  const value = pencePerKg(about.tenthPencePerKg) - pencePerKg(model.input.packingTenthPencePerKg);
  const packs = lp.addColumn(`loose_${about.step}_${name}`, { upper: about.packs });
  const grams = lp.addColumn(`grams_${about.step}_${name}`, { cost: value });
  lp.addRow(
    `heavy_${about.step}_${name}`,
    [
      [1, grams],
      [-cut.minPackGrams / 1000, packs],
    ],
    ['>=', 0],
  );
  lp.addRow(
    `light_${about.step}_${name}`,
    [
      [1, grams],
      [-cut.maxPackGrams / 1000, packs],
    ],
    ['<=', 0],
  );
  return { packs, grams };
}

function addSources(model: AllocationModel, { name, demand }: LooseDraft): LooseColumns['sources'] {
  const states = (['fresh', 'frozen'] as const).filter((state) => hasSupply(model, demand.cutId, state));
  return states.map((state) => {
    const column = model.lp.addColumn(`loose_${name}_${state}`);
    addTerm(model.uses, heapKey(demand.cutId, state), [1, column]);
    if (state === 'fresh') addTerm(model.packed, demand.cutId, [1, column]);
    return { state, column };
  });
}

function addWholePacks(model: AllocationModel, name: string, steps: readonly Step[]): string {
  const whole = model.lp.addColumn(`loose_packs_${name}`, { kind: 'integer' });
  const parts = steps.map(({ packs }): Term => [-1, packs]);
  model.lp.addRow(`loose_count_${name}`, [[1, whole], ...parts], ['=', 0]);
  return whole;
}

/** Loose packs: what is sold already at the list price, then steps of falling rates. */
function addLoose(model: AllocationModel, demand: LooseDemand): void {
  const { lp } = model;
  const cut = getCut(model, demand.cutId);
  const name = model.namer.name('k', demand.cutId);
  const draft: LooseDraft = { name, cut, demand };
  const sold = addStep(model, draft, { step: 'sold', packs: demand.floor, tenthPencePerKg: cut.tenthPencePerKg });
  const more = demand.steps.map((step, index) => addStep(model, draft, { step: `more${index + 1}`, ...step }));
  const steps = [sold, ...more];
  const sources = addSources(model, draft);
  const taken = sources.map(({ column }): Term => [1, column]);
  lp.addRow(`loose_grams_${name}`, [...taken, ...steps.map(({ grams }): Term => [-1, grams])], ['=', 0]);
  const short = addShort(model, {
    name: `short_loose_${name}`,
    most: demand.floor,
    isWhole: false,
    priority: demand.priority,
    penceEach: Math.max(1, (pencePerKg(cut.tenthPencePerKg) * (cut.minPackGrams + cut.maxPackGrams)) / 2000),
  });
  lp.addRow(`loose_floor_${name}`, [[1, sold.packs], ...short], ['=', demand.floor]);
  model.loose.push({ demand, sources, packs: model.isPacked ? addWholePacks(model, name, steps) : null });
}

export function addLooseDemand(model: AllocationModel): void {
  for (const demand of model.input.loose) addLoose(model, demand);
}
