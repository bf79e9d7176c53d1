import { expect } from 'vitest';
import type { Allocation, Lock } from '#shared/contracts/allocation.ts';
import type { PlanJob } from '#shared/contracts/plan-jobs.ts';
import type { World } from './harness.ts';

type Caller = ReturnType<World['request']>;

/** Asks for a job until it has ended; the server itself waits a moment each time. */
export async function awaitPlanJob(owner: Caller, jobId: string): Promise<PlanJob> {
  for (;;) {
    const job = (await owner.get(`/api/plan-jobs/${jobId}`).expect(200)).body as PlanJob;
    if (job.state !== 'working') return job;
  }
}

/** The plan that the workbench would show after `Work it out`. */
export async function workOut(owner: Caller, dayId: string, locks: Lock[] = []): Promise<Allocation> {
  const started = await owner.post(`/api/cutting-days/${dayId}/plan-jobs`).send({ locks, timeLimitSeconds: 120 });
  expect(started.body, 'the plan was not started').toHaveProperty('jobId');
  const job = await awaitPlanJob(owner, (started.body as { jobId: string }).jobId);
  if (!job.allocation) throw new Error(`the plan ${job.state}: ${job.problem ?? 'no reason'}`);
  return job.allocation;
}
