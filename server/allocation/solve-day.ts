import type { AllocationAnswer, AllocationQuestion } from '#shared/domain/allocation-record.ts';
import { allocate } from '#shared/engine/allocation/allocate.ts';
import { explain, type Explanation } from '#shared/engine/allocation/explain.ts';
import type { AllocateOptions } from '#shared/engine/allocation/plan-progress.ts';
import type { AllocationPlan } from '#shared/engine/allocation/allocation-plan.ts';
import type { Solver } from '#shared/engine/linear/solve.ts';
import { promiseOffers } from '#shared/engine/promise/promise.ts';
import type { BoxPromise } from '#shared/engine/promise/promise-types.ts';

/** A day may be worked on for this long; what is not proven by then is shown with its gap and cannot be published. */
export const TIME_LIMIT_SECONDS = 60;
/** Nine days in ten, what was put on sale can all be filled. */
const CONFIDENCE = 0.9;
const SCENARIOS = 1_000;
const SEED = 1;

export type SolvedQuestion = { question: AllocationQuestion; plan: AllocationAnswer['plan'] };

/** How a solve is listened to, cancelled and limited in time. */
export type SolveHow = Pick<AllocateOptions, 'onProgress' | 'signal' | 'timeLimitSeconds'>;

/** The plan alone. The solver runs in its own threads: the API keeps answering. */
export async function solveDay(
  question: Omit<AllocationQuestion, 'lpText'>,
  solver: Solver,
  how: SolveHow = {},
): Promise<SolvedQuestion> {
  const { lpText, ...plan } = await allocate(question.input, solver, { timeLimitSeconds: TIME_LIMIT_SECONDS, ...how });
  return { question: { ...question, lpText }, plan };
}

/** What may be put on sale of a plan while its weights may still be off. */
export function promiseDay({ question, plan }: SolvedQuestion, solver: Solver): Promise<BoxPromise> {
  const asked = { input: question.input, plan: toPlan({ question, plan }), spreads: question.spreads };
  return promiseOffers({ ...asked, confidence: CONFIDENCE, scenarios: SCENARIOS, seed: SEED }, solver);
}

/** Why the plan is as it is, by solving it again with one thing changed at a time. */
export function explainDay(solved: SolvedQuestion, solver: Solver): Promise<Explanation> {
  const options = { timeLimitSeconds: TIME_LIMIT_SECONDS };
  return explain(solved.question.input, toPlan(solved), { solver, options });
}

function toPlan({ question, plan }: SolvedQuestion): AllocationPlan {
  return { ...plan, lpText: question.lpText };
}
