import type { Solver } from '#shared/engine/linear/solve.ts';
import type { AllocationInput } from './allocation-input.ts';
import type { AllocationPlan } from './allocation-plan.ts';
import { buildModel } from './build-model.ts';
import { checkInput } from './check-input.ts';
import { orderInput } from './order-input.ts';
import { failed, isProof, solvePhases, type Session } from './phases.ts';
import type { AllocateOptions } from './plan-progress.ts';
import { makeWhole } from './whole-packs.ts';

/** A question put in order and checked, not yet solved. */
export function openSession(input: AllocationInput, solver: Solver, options: AllocateOptions = {}): Session {
  const ordered = orderInput(input);
  checkInput(ordered);
  const clock = { spentMilliseconds: 0 };
  const model = buildModel(ordered);
  return { solver, options, phase: 'contribution', clock, isProven: true, model, fixed: [], caps: new Map() };
}

/**
 * Plans one cutting day: the fate of every primal, boxes, loose packs, trade and mince of greatest contribution after
 * the least shortfall of what is promised. The same input gives the same plan, in whatever order it comes. It can be
 * listened to, cancelled and limited in time: see `AllocateOptions`.
 */
export async function allocate(
  input: AllocationInput,
  solver: Solver,
  options: AllocateOptions = {},
): Promise<AllocationPlan> {
  const session = openSession(input, solver, options);
  const solved = await solvePhases(session, new Map());
  if (!solved.solution.hasAnswer) throw failed('No plan was found in time.');
  const { draft, packRounds } = await makeWhole(session, solved);
  const { failures, dealt: _dealt, ...plan } = draft;
  const [failure] = failures;
  return {
    ...plan,
    isProven: session.isProven && isProof(session, solved.solution),
    gap: solved.solution.gap,
    wholePackPence: Math.round(solved.solution.objective) - plan.contributionPence,
    packRounds,
    unfillable: failure ? { variantId: failure.variant.id, lineId: failure.line.id, name: failure.line.name } : null,
    lpText: solved.lpText,
    milliseconds: session.clock.spentMilliseconds,
  };
}
