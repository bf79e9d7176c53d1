import type { PlanJob } from '#shared/contracts/plan-jobs.ts';
import * as contract from '#shared/contracts/plan-jobs.ts';
import * as schema from '#shared/contracts/plan-jobs-schema.ts';
import type { Deps } from '#server/deps.ts';
import { route, type Api } from '#server/http/route.ts';
import { getAllocation } from './allocation-queries.ts';
import { allocateDay, viewAllocation } from './allocation-service.ts';
import { loadDayFacts } from './day-facts.ts';
import { PlanJobs, type Job } from './plan-jobs.ts';
import { answerWhatIf } from './what-if.ts';

export function addPlanJobRoutes(api: Api, deps: Deps): void {
  const jobs = new PlanJobs();
  route(api, contract.startPlan, {
    schema: schema.startPlanSchema,
    handle: async ({ params: { dayId }, body: { locks, timeLimitSeconds } }) => {
      // What can be refused at once is: the job would only say it later.
      await loadDayFacts(deps.db, dayId);
      const jobId = jobs.start(async ({ signal, onProgress }) => {
        const row = await allocateDay(deps, { dayId, locks }, { signal, onProgress, timeLimitSeconds });
        return { allocationId: row.id };
      });
      return { jobId };
    },
  });
  route(api, contract.startWhatIf, {
    schema: schema.startWhatIfSchema,
    handle: async ({ params: { dayId }, body }) => {
      await loadDayFacts(deps.db, dayId);
      const jobId = jobs.start(async (control) => ({
        outcomes: await answerWhatIf(deps, { dayId, ...body }, control),
      }));
      return { jobId };
    },
  });
  route(api, contract.getPlanJob, {
    schema: schema.getPlanJobSchema,
    handle: async ({ params }) => describeJob(deps, await jobs.look(params.jobId)),
  });
  route(api, contract.cancelPlanJob, {
    schema: schema.cancelPlanJobSchema,
    handle: async ({ params }) => describeJob(deps, await jobs.cancel(params.jobId)),
  });
}

async function describeJob(deps: Deps, { id, state, step, progress, result, problem }: Job): Promise<PlanJob> {
  const isKept = result !== null && 'allocationId' in result;
  return {
    ...{ id, state, step, problem },
    progress: progress && {
      phase: progress.phase,
      milliseconds: Math.round(progress.milliseconds),
      bestPence: progress.best === null ? null : Math.round(progress.best),
      gapBasisPoints: progress.gap === null ? null : Math.ceil(progress.gap * 10_000),
    },
    allocation: isKept ? await viewAllocation(deps, await getAllocation(deps.db, result.allocationId)) : null,
    outcomes: result !== null && 'outcomes' in result ? result.outcomes : null,
  };
}
