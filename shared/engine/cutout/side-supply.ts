import { priceForWeight } from '#shared/domain/money.ts';
import type { Choice, Primal, Quarter, QuarterId, Specification, Way } from '#shared/engine/figures/specification.ts';
import type { CarcaseFacts, ChoiceSupply, CutoutNode, SideName, SideSupply, WayYield } from './cutout-types.ts';
import { lineWeights, share, type WayOfChoice } from './side-tree.ts';

export type SupplyOf = {
  carcase: CarcaseFacts;
  coldGrams: number;
  specification: Specification;
  quarters: readonly [Quarter, Quarter];
  nodes: ReadonlyMap<string, CutoutNode>;
  ways: Readonly<Record<SideName, WayOfChoice>>;
  closedReason: string | null;
};

/**
 * What one side would give by every way of every choice, from the weights as they stand. Of the way in use the lines are
 * those of the cutout, so that weighed packs count; of the others they are shares of the primal. Bone, fat and loss stay
 * out. Whole sides, quarters and primals with vertebrae are closed together with the ways that keep them.
 */
export function supplyOfSide(side: SideName, of: SupplyOf): SideSupply {
  const { carcase } = of;
  const grams = (path: string) => of.nodes.get(path)?.grams ?? 0;
  return {
    id: `${carcase.id}/${side}`,
    carcaseId: carcase.id,
    side,
    grams: grams(side),
    quarterGrams: { fore: grams(`${side}/fore`), hind: grams(`${side}/hind`) },
    coldCarcaseGrams: of.coldGrams,
    conformation: carcase.conformation,
    fatClass: carcase.fatClass,
    hangingDays: carcase.hanging.days,
    closedUnitReason: of.closedReason,
    choices: of.specification.choices.map((choice) => supplyOfChoice(side, choice, of)),
  };
}

type Weighed = { primal: Primal; path: string; grams: number };

function supplyOfChoice(side: SideName, choice: Choice, of: SupplyOf): ChoiceSupply {
  const quarter = quarterOf(choice, of.quarters);
  const primals = quarter.primals
    .filter(({ id }) => choice.primalIds.includes(id))
    .map((primal): Weighed => {
      const path = `${side}/${quarter.id}/${primal.id}`;
      return { primal, path, grams: of.nodes.get(path)?.grams ?? 0 };
    });
  const inUse = of.ways[side].get(choice.id);
  return {
    choiceId: choice.id,
    name: choice.name,
    quarter: quarter.id satisfies QuarterId,
    primals: primals.map(({ primal, grams }) => ({
      primalId: primal.id,
      name: primal.name,
      grams,
      hasVertebrae: primal.hasVertebrae,
    })),
    ways: choice.ways.map((way) => yieldOfWay(way, primals, { of, isInUse: way.id === inUse?.id })),
  };
}

function quarterOf(choice: Choice, quarters: readonly [Quarter, Quarter]): Quarter {
  const [fore, hind] = quarters;
  return fore.primals.some(({ id }) => choice.primalIds.includes(id)) ? fore : hind;
}

function yieldOfWay(
  way: Way,
  primals: readonly Weighed[],
  { of, isInUse }: { of: SupplyOf; isInUse: boolean },
): WayYield {
  const products = new Set(way.lines.filter(({ kind }) => kind === 'cut' || kind === 'trim').map(({ id }) => id));
  const yields = primals.flatMap(({ primal, path, grams }) => {
    const weights = lineWeights(primal, way);
    const parts = share(grams, weights);
    return weights
      .filter(({ id }) => products.has(id))
      .map(({ id }) => ({
        primalId: primal.id,
        cutId: id,
        grams: (isInUse ? of.nodes.get(`${path}/${id}`)?.grams : undefined) ?? parts.get(id) ?? 0,
      }));
  });
  const grams = primals.reduce((sum, primal) => sum + primal.grams, 0);
  return {
    wayId: way.id,
    name: way.name,
    closedReason: way.keepsVertebrae ? of.closedReason : null,
    yields,
    costPence: priceForWeight(grams, way.extraTenthPencePerKg),
  };
}
