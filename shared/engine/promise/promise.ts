import type { Solution, SolveOptions, Solver } from '#shared/engine/linear/solve.ts';
import { rankOfBound } from './order-statistic.ts';
import { buildPromiseModel, listOffers, mostOf, type Offer, type PromiseModel } from './promise-model.ts';
import type { BoxPromise, PromiseInput } from './promise-types.ts';
import { drawSupply, readUncertainty, type Supply } from './scenarios.ts';

/** A count that misses a whole number by less is that number: a solver's tolerance, far below a gram. */
const TOLERANCE = 1e-6;
const CHUNK = 100;

type Scenario = {
  supply: Supply;
  /** Share of the plan's offers that can be filled, nothing below what is sold and held; -1 when that itself cannot. */
  share: number;
};

type Run = {
  input: PromiseInput;
  solver: Solver;
  options: SolveOptions;
  offers: readonly Offer[];
  /** Least share first. */
  scenarios: Scenario[];
  /** How many scenarios may go wrong. */
  mayFail: number;
};

async function solveAll(run: Pick<Run, 'solver' | 'options'>, model: PromiseModel, supplies: readonly Supply[]) {
  const solutions: Solution[] = [];
  for (let at = 0; at < supplies.length; at += CHUNK) {
    const variations = supplies.slice(at, at + CHUNK).map(model.changesOf);
    solutions.push(...(await run.solver.solveVariations(model.lpText, variations, run.options)));
  }
  return solutions;
}

async function drawScenarios(run: Omit<Run, 'scenarios'>): Promise<Scenario[]> {
  const { input, offers } = run;
  const uncertainty = readUncertainty(input);
  const supplies = Array.from({ length: input.scenarios }, (_, scenario) =>
    drawSupply(uncertainty, { seed: input.seed, scenario }),
  );
  if (offers.length === 0) return supplies.map((supply) => ({ supply, share: 1 }));
  const model = buildPromiseModel(input, offers, { find: 'share' });
  const solutions = await solveAll(run, model, supplies);
  return supplies.map((supply, at) => ({ supply, share: shareOf(solutions[at]) })).sort((a, b) => a.share - b.share);
}

function shareOf(solution: Solution | undefined): number {
  return solution?.hasAnswer ? Math.min(1, Math.max(0, solution.objective)) : -1;
}

type Counts = Map<Offer, number>;

/**
 * Whether these counts are within what a scenario fills by its share alone: then nothing needs to be solved for it.
 */
function isCovered(counts: Counts, except: Offer, share: number): boolean {
  return [...counts].every(
    ([offer, count]) => offer === except || count <= Math.max(offer.floor, share * offer.planned + TOLERANCE),
  );
}

/**
 * Raises one offer as far as the joint confidence allows, the others standing. Scenarios are asked from the least share
 * up, and no further than where a scenario's share alone would do. Returns how many scenarios then fail, null where
 * nothing could be raised.
 */
async function raise(run: Run, offer: Offer, counts: Counts): Promise<number | null> {
  const now = counts.get(offer) ?? 0;
  const most = mostOf(offer);
  if (now >= most) return null;
  const model = buildPromiseModel(run.input, run.offers, { find: 'most', offer, counts });
  const reached: number[] = [];
  let limit = most;
  for (let at = 0; at < run.scenarios.length; at += CHUNK) {
    const chunk = run.scenarios.slice(at, at + CHUNK);
    const share = chunk[0]?.share ?? 0;
    if (isCovered(counts, offer, share) && share * offer.planned + TOLERANCE >= limit) break;
    const solutions = await solveAll(
      run,
      model,
      chunk.map(({ supply }) => supply),
    );
    reached.push(...solutions.map((solution) => (solution.hasAnswer ? solution.objective : -1)));
    const ranked = [...reached].sort((a, b) => a - b);
    limit = Math.min(most, Math.floor((ranked[run.mayFail] ?? most) + TOLERANCE));
    if (limit <= now) return null;
  }
  counts.set(offer, limit);
  return reached.filter((count) => count + TOLERANCE < limit).length;
}

/**
 * How many boxes and loose packs may be put on sale while weights are estimates: the largest numbers, none above the plan
 * and none below what is sold and held, that can all be filled together with the chosen confidence.
 *
 * Seeded scenarios draw carcase, primal and line weights; one linear program a scenario finds the largest share of the
 * plan's offers that can be filled. The order statistic with a 95 % bound gives the share that is safe; whole numbers
 * below it are then raised one offer at a time while the joint confidence holds. When what is sold and held is itself not
 * safe, the promise stays at it and the shortfall's distribution is returned.
 */
export async function promiseOffers(
  input: PromiseInput,
  solver: Solver,
  options: SolveOptions = {},
): Promise<BoxPromise> {
  const offers = listOffers(input.input, input.plan);
  const mayFail = rankOfBound(input.scenarios, input.confidence) - 1;
  const start = { input, solver, options, offers, mayFail };
  const run: Run = { ...start, scenarios: await drawScenarios(start) };
  const share = mayFail >= 0 ? (run.scenarios[mayFail]?.share ?? -1) : -1;
  const counts: Counts = new Map(offers.map((offer) => [offer, startOf(offer, share)]));
  let failing = run.scenarios.filter((scenario) => scenario.share < Math.max(0, share)).length;
  if (share >= 0) for (const offer of offers) failing = (await raise(run, offer, counts)) ?? failing;
  return {
    ...describeCounts(counts),
    jointConfidence: run.scenarios.length > 0 ? 1 - failing / run.scenarios.length : 0,
    safeSharePpht: Math.floor((Math.max(0, share) + TOLERANCE) * 100_000),
    isFloorAtRisk: share < 0,
    floorShortfall: share < 0 ? await measureShortfall(run) : null,
  };
}

function startOf(offer: Offer, share: number): number {
  return Math.max(offer.floor, Math.floor(Math.max(0, share) * offer.planned + TOLERANCE));
}

function describeCounts(counts: Counts): Pick<BoxPromise, 'boxes' | 'loose'> {
  const rows = [...counts].map(([offer, promised]) => ({ offer, promised }));
  const of = (kind: Offer['kind']) => rows.filter(({ offer }) => offer.kind === kind);
  return {
    boxes: of('box').map(({ offer: { id, planned, floor }, promised }) => ({
      variantId: id,
      planned,
      promised,
      floor,
    })),
    loose: of('loose').map(({ offer: { id, planned, floor }, promised }) => ({ cutId: id, planned, promised, floor })),
  };
}

/** How much is missing for what is sold and held, over the scenarios in which something is. */
async function measureShortfall(run: Run): Promise<BoxPromise['floorShortfall']> {
  const short = run.scenarios.filter(({ share }) => share < 0);
  if (short.length === 0) return null;
  const model = buildPromiseModel(run.input, run.offers, { find: 'shortfall' });
  const solutions = await solveAll(
    run,
    model,
    short.map(({ supply }) => supply),
  );
  const grams = solutions.map(({ objective }) => Math.round(objective * 1000));
  return {
    shareOfScenarios: short.length / run.scenarios.length,
    meanShortGrams: Math.round(grams.reduce((sum, each) => sum + each, 0) / grams.length),
    worstShortGrams: Math.max(...grams),
  };
}
