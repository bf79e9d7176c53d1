import { formatGrams } from '#shared/domain/words.ts';
import { EngineError } from '#shared/engine/engine-error.ts';
import { checkSpecification } from '#shared/engine/figures/check-specification.ts';
import { AppError } from '#shared/errors.ts';
import { SIDES, type Cutout, type CutoutInput, type CutoutNode } from './cutout-types.ts';
import { effectiveSpecification } from './effective-specification.ts';
import { weighTree, WEIGHING_TOLERANCE_PER_MILLE } from './measured-weights.ts';
import { buildTree, type TreeNode } from './side-tree.ts';
import { supplyOfSide } from './side-supply.ts';
import { judgeAge } from './vertebrae-rule.ts';
import { listClosedWays, pickWays } from './way-choice.ts';
import { chainWeights, requireGrams, type WeightChain } from './weight-chain.ts';

/**
 * What one carcase gives: live, hot, cold and hung weight, then both sides down to cuts, trim, bone, fat and loss, in
 * whole grams. Every node's parts and its weighing difference add up to it. Measured weights win at their level and
 * rescale what lies under them; each figure says whether it is estimated or weighed.
 *
 * Refuses with SPEC_NOT_100, CLASS_UNKNOWN, WEIGHT_OUT_OF_RANGE, MEASURED_EXCEEDS_PARENT; with INVALID_INPUT when a
 * measured weight names nothing that this carcase has.
 */
export function cutout(input: CutoutInput): Cutout {
  const { carcase, specification, rule } = input;
  checkSpecification(specification);
  const chain = chainWeights(carcase);
  const age = judgeAge(carcase, rule);
  const effective = effectiveSpecification(specification, carcase);
  const measuredPaths = Object.keys(carcase.measured);
  const ways = pickWays({ specification, measuredPaths, closedReason: age.closedReason, chosen: input.ways });
  const hungGrams = carcase.measured['hung'] ?? chain.hungEstimateGrams;
  requireGrams('hung', hungGrams);
  const sideGrams = carcase.sideGrams ?? null;
  if (sideGrams) for (const side of SIDES) requireGrams('side', sideGrams[side]);
  const tree = buildTree(hungGrams, { specification, quarters: effective.quarters, ways, sideGrams });
  const nodes = weighTree(tree, readMeasured(carcase.measured, tree));
  const hung = readHung(nodes, chain);
  const supply = {
    carcase,
    coldGrams: chain.cold.grams,
    specification,
    quarters: effective.quarters,
    nodes: new Map(nodes.map((node) => [node.path, node])),
    ways,
    closedReason: age.closedReason,
  };
  return {
    live: chain.live,
    hot: chain.hot,
    cold: chain.cold,
    hung: { grams: hung.grams, source: hung.source },
    ageMonths: age.ageMonths,
    isOverThirtyMonths: age.isOverThirtyMonths,
    isGraded: effective.isGraded,
    nodes: nodes.map((node) => (node === hung ? { ...node, estimatedGrams: chain.hungEstimateGrams } : node)),
    closedWays: listClosedWays(specification, age.closedReason),
    clamps: effective.clamps,
    sides: SIDES.map((side) => supplyOfSide(side, supply)),
  };
}

/** `hung` is what the scales say of the node `carcase`; every other path must be one of the tree. */
function readMeasured(measured: Readonly<Record<string, number>>, tree: TreeNode): Record<string, number> {
  const known = new Set(listPaths(tree));
  const read: Record<string, number> = {};
  for (const [given, grams] of Object.entries(measured)) {
    const path = given === 'hung' ? tree.path : given;
    if (!known.has(path) || (given !== 'hung' && path === tree.path)) {
      const message = `There is nothing called ${given} in this carcase as it is cut. Nothing was changed.`;
      throw new AppError('INVALID_INPUT', message, { fields: { [given]: message } });
    }
    if (!Number.isSafeInteger(grams) || grams < 0) {
      const message = `${given}: a weight is a whole number of grams, not ${grams}. Nothing was changed.`;
      throw new EngineError('WEIGHT_OUT_OF_RANGE', message, { node: given, figures: { grams } });
    }
    if (path === 'left' || path === 'right') requireGrams('side', grams);
    read[path] = grams;
  }
  return read;
}

function listPaths(node: TreeNode): string[] {
  return [node.path, ...node.children.flatMap(listPaths)];
}

/** A weighed carcase does not gain by hanging. */
function readHung(nodes: readonly CutoutNode[], { cold }: WeightChain): CutoutNode {
  const [hung] = nodes;
  if (!hung) throw new RangeError('a cutout without a carcase');
  const mostGrams = (cold.grams * (1000 + WEIGHING_TOLERANCE_PER_MILLE)) / 1000;
  if (cold.source === 'weighed' && hung.grams > mostGrams) {
    const message =
      `Hung, the carcase weighs ${formatGrams(hung.grams)}; cold it weighed ${formatGrams(cold.grams)}. ` +
      'It cannot have gained. Nothing was changed; weigh again or correct the figure.';
    const figures = { partsGrams: hung.grams, parentGrams: cold.grams, differenceGrams: hung.grams - cold.grams };
    throw new EngineError('MEASURED_EXCEEDS_PARENT', message, { node: 'hung', figures });
  }
  return hung;
}
