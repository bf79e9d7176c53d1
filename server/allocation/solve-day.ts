import type { AllocationAnswer, AllocationQuestion } from '#shared/domain/allocation-record.ts';
import { allocate } from '#shared/engine/allocation/allocate.ts';
import type { AllocationInput } from '#shared/engine/allocation/allocation-input.ts';
import type { Solver } from '#shared/engine/linear/solve.ts';

/** A day may be worked on for this long; what is not proven by then is shown with its gap and cannot be published. */
const TIME_LIMIT_SECONDS = 60;

export type SolvedQuestion = { question: AllocationQuestion; answer: Omit<AllocationAnswer, 'weighedCarcaseIds'> };

/** The plan and its explanations. The solver runs in its own thread: the API keeps answering. */
export async function solveDay(input: AllocationInput, solver: Solver): Promise<SolvedQuestion> {
  const { lpText, ...plan } = await allocate(input, solver, { timeLimitSeconds: TIME_LIMIT_SECONDS });
  return { question: { input, lpText }, answer: { plan, limits: [], worths: [], lockCosts: [] } };
}
