import { randomUUID } from 'node:crypto';
import { setTimeout as sleep } from 'node:timers/promises';
import type { Outcome, PlanJob } from '#shared/contracts/plan-jobs.ts';
import type { PlanProgress } from '#shared/engine/allocation/plan-progress.ts';
import { AppError } from '#shared/errors.ts';
import { log } from '#server/http/log.ts';

/** What a job comes to: a plan that was kept, or both answers of a what-if. */
export type JobResult = { allocationId: string } | { outcomes: { before: Outcome; after: Outcome } };

/** What a job's work is given: it listens for the cancelling, and tells how far it has come. */
export type JobControl = {
  signal: AbortSignal;
  onProgress: (progress: PlanProgress) => void;
  /** Names the answer that is worked on now. */
  onStep: (step: string) => void;
};

export type Job = {
  id: string;
  state: PlanJob['state'];
  step: string | null;
  progress: PlanProgress | null;
  result: JobResult | null;
  problem: string | null;
};

type Running = Job & { controller: AbortController; settled: Promise<void> };

/** Jobs that have ended are remembered up to this many, for screens that have not asked yet. */
const REMEMBERED = 50;
/** How long a question about a job that still works is kept waiting. */
const WAIT_MILLISECONDS = 600;
const CANCELLED = new Error('the plan was cancelled');
/** An answer of another phase begins afresh. */
const NO_PROGRESS = { step: null, progress: null, result: null, problem: null };

/**
 * Plans that are being worked out, in the memory of this process: when it stops, so do they, and nothing was kept. What a
 * job keeps it keeps in the database as it ends.
 */
export class PlanJobs {
  private readonly jobs = new Map<string, Running>();

  start(work: (control: JobControl) => Promise<JobResult>): string {
    const controller = new AbortController();
    const id = randomUUID();
    const job: Running = { id, state: 'working', ...NO_PROGRESS, controller, settled: Promise.resolve() };
    const control: JobControl = {
      signal: controller.signal,
      onProgress: (progress) => (job.progress = progress),
      onStep: (step) => (job.step = step),
    };
    job.settled = work(control).then(
      (result) => this.end(job, { state: 'done', result }),
      (error: unknown) => this.end(job, failureOf(error, controller.signal)),
    );
    this.jobs.set(id, job);
    return id;
  }

  /** As soon as the job has ended, and after a moment at the latest. */
  async look(id: string): Promise<Job> {
    const job = this.get(id);
    if (job.state !== 'working') return job;
    const pause = new AbortController();
    await Promise.race([job.settled, sleep(WAIT_MILLISECONDS, undefined, { ref: false, signal: pause.signal })]);
    pause.abort();
    return job;
  }

  /** A job that has ended meanwhile stays as it ended. */
  async cancel(id: string): Promise<Job> {
    const job = this.get(id);
    job.controller.abort(CANCELLED);
    await job.settled;
    return job;
  }

  private get(id: string): Running {
    const job = this.jobs.get(id);
    if (job) return job;
    throw new AppError('NOT_FOUND', 'Nothing is being worked out under this number any more. Work it out again.');
  }

  private end(job: Running, how: Partial<Job>): void {
    Object.assign(job, how);
    const ended = [...this.jobs.values()].filter(({ state }) => state !== 'working');
    for (const old of ended.slice(0, -REMEMBERED)) this.jobs.delete(old.id);
  }
}

function failureOf(error: unknown, signal: AbortSignal): Partial<Job> {
  if (signal.aborted) return { state: 'cancelled' };
  if (error instanceof AppError) return { state: 'failed', problem: error.message };
  log.error({ err: error }, 'a plan failed');
  return {
    state: 'failed',
    problem: 'This did not work, through a fault of ours. Nothing was kept; please try again.',
  };
}
