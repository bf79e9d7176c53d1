import { createSolver, type Solver } from '#server/allocation/solver/solver-pool.ts';
import { openSession } from '#shared/engine/allocation/allocate.ts';
import type { AllocationInput } from '#shared/engine/allocation/allocation-input.ts';
import { solvePhases, type Solved } from '#shared/engine/allocation/phases.ts';
import { boundFill } from '#shared/engine/box-fill/bound-model.ts';
import { fillBoxes } from '#shared/engine/box-fill/fill-boxes.ts';
import { solveWithCbc, solveWithGlpk, type OtherSolver } from '#tests/support/other-solvers.ts';
import { makeAllocationInstance } from './allocation-instances.ts';
import { dearestWays, traditionalWays } from './allocation-rules.ts';
import { makeFillInstance } from './box-fill-instances.ts';

/** Made days of 8 boxes, 12 loose cuts and 25 trade lines; the same seed on every machine. */
const SEED = 2;
const CARCASES = [1, 8, 40, 120];
const GAP = 0.0001;
/** Seconds after which another solver is stopped and its line says so. */
const PATIENCE_SECONDS = 40;
/** A bench that is stopped shows its gap; the program's own limit is a minute for the whole question. */
const LIMIT_SECONDS = 60;

/** Seconds by the clock and of the processor: on a shared machine the second says what the first hides. */
type Timed = Solved & { seconds: number; processorSeconds: number; size: string };

async function plan(input: AllocationInput, solver: Solver): Promise<Timed> {
  const startedAt = performance.now();
  const usedBefore = process.cpuUsage();
  const session = openSession(input, solver, { gap: GAP, timeLimitSeconds: LIMIT_SECONDS });
  const solved = await solvePhases(session, new Map());
  const { columns, integers, rows } = session.model.lp.size;
  const { user, system } = process.cpuUsage(usedBefore);
  const seconds = (performance.now() - startedAt) / 1000;
  const processorSeconds = (user + system) / 1_000_000;
  return { ...solved, seconds, processorSeconds, size: `${columns} (${integers}) / ${rows}` };
}

async function timeOther(solve: OtherSolver, lpText: string, seconds: number): Promise<string> {
  const answer = await solve({ lp: lpText }, { gap: GAP, seconds: PATIENCE_SECONDS });
  const ratio = (answer.seconds / seconds).toFixed(1);
  return answer.isProven ? `${answer.seconds.toFixed(1)} s (${ratio}x)` : `over ${PATIENCE_SECONDS} s (>${ratio}x)`;
}

function pounds(pence: number): string {
  return `£${Math.round(pence / 100)}`;
}

/** One line of the table: ours against two other solvers on the same file, and against two rules of thumb. */
async function benchDay(carcases: number, solver: Solver): Promise<Record<string, string | number>> {
  const input = makeAllocationInstance({ carcases, seed: SEED });
  const ours = await plan(input, solver);
  const cbc = await timeOther(solveWithCbc, ours.lpText, ours.seconds);
  const glpk = await timeOther(solveWithGlpk, ours.lpText, ours.seconds);
  const greedy = await plan(dearestWays(input), solver);
  const traditional = await plan(traditionalWays(input), solver);
  return {
    carcases,
    'columns (whole) / rows': ours.size,
    seconds: ours.seconds.toFixed(2),
    'of the processor': ours.processorSeconds.toFixed(2),
    gap: `${(ours.solution.gap * 100).toFixed(4)} %`,
    proven: ours.solution.status === 'optimal' ? 'yes' : 'no',
    CBC: cbc,
    GLPK: glpk,
    contribution: pounds(ours.solution.objective),
    'dearest way each': pounds(greedy.solution.objective),
    'traditional ways': pounds(traditional.solution.objective),
  };
}

async function benchFill(boxes: number, solver: Solver): Promise<Record<string, string | number>> {
  const input = makeFillInstance({ boxes, seed: SEED });
  const startedAt = performance.now();
  const fill = fillBoxes(input);
  const seconds = (performance.now() - startedAt) / 1000;
  const filled = input.boxes.filter(({ id }) => !fill.unfilledBoxIds.includes(id));
  const bound = await boundFill(filled, input.packs, solver);
  const share = (fill.giveAwayGrams - bound) / Math.max(1, fill.packedGrams);
  return {
    boxes,
    packs: input.packs.length,
    seconds: seconds.toFixed(2),
    'given away, g': fill.giveAwayGrams,
    'lower bound, g': bound,
    'above the bound': `${(share * 100).toFixed(3)} %`,
    unfilled: fill.unfilledBoxIds.length,
  };
}

async function main(): Promise<void> {
  const memoryBefore = process.memoryUsage().rss;
  const solver = createSolver({ size: 1 });
  await solver.warm();
  // The machine code of the solver is finished by its first real model.
  await plan(makeAllocationInstance({ carcases: 1, seed: 1 }), solver);
  const days: Record<string, string | number>[] = [];
  for (const carcases of CARCASES) days.push(await benchDay(carcases, solver));
  console.log(
    `\nAllocation, proven within ${GAP * 100} % of the optimum, solver warm; other solvers on the same file:`,
  );
  console.table(days);
  console.log(`Memory added: ${Math.round((process.memoryUsage().rss - memoryBefore) / 1024 / 1024)} MB`);
  console.log('\nBox fill, twelve packs a box, a tenth more packs than needed:');
  console.table([await benchFill(60, solver), await benchFill(400, solver)]);
  await solver.stop();
}

await main();
