import { setTimeout as sleep } from 'node:timers/promises';
import { Worker } from 'node:worker_threads';
import { EngineError } from '#shared/engine/engine-error.ts';
import type {
  RowChange,
  Solution,
  SolveOptions,
  SolveProgress,
  Solver as EngineSolver,
} from '#shared/engine/linear/solve.ts';

export type Solver = EngineSolver & {
  /** Starts the first thread, so that the first question does not pay for it. */
  warm: () => Promise<void>;
  /** Ends every thread; questions still open are refused. */
  stop: () => Promise<void>;
};

type Task = { lpText: string; options: SolveOptions; variations?: readonly RowChange[][] };
type Message =
  | { kind: 'ready' }
  | { kind: 'progress'; progress: SolveProgress }
  | { kind: 'answer'; answer: Solution | Solution[] }
  | { kind: 'failure'; message: string };
type Job = {
  task: Task;
  resolve: (answer: Solution | Solution[]) => void;
  reject: (reason: Error) => void;
  /** Takes the job's own listeners and timers off. */
  release: () => void;
};
type Thread = { worker: Worker; ready: Promise<void>; job: Job | null; idle: AbortController | null };

/** How long a thread may overrun its own time limit before it is ended from outside. */
const GRACE_SECONDS = 5;
const DEFAULT_TIME_LIMIT_SECONDS = 60;
/** Every thread but the first gives its memory (about 120 MB) back after this time without work. */
const IDLE_MILLISECONDS = 30_000;

function failed(message: string): EngineError {
  return new EngineError('SOLVER_FAILED', `No answer could be computed: ${message}. Nothing was changed.`, {
    node: 'solver',
  });
}

function cancelled(signal: AbortSignal): Error {
  return signal.reason instanceof Error ? signal.reason : new Error('cancelled');
}

class SolverPool {
  private readonly threads: Thread[] = [];
  private readonly waiting: Job[] = [];
  private isStopped = false;
  private readonly size: number;

  constructor(size: number) {
    this.size = size;
  }

  solve(task: Task): Promise<Solution | Solution[]> {
    const { signal } = task.options;
    if (this.isStopped) return Promise.reject(failed('the solver has been stopped'));
    if (signal?.aborted) return Promise.reject(cancelled(signal));
    return new Promise((resolve, reject) => {
      const job: Job = { task, resolve, reject, release: () => undefined };
      const onAbort = () => signal && this.abandon(job, cancelled(signal));
      signal?.addEventListener('abort', onAbort, { once: true });
      job.release = () => signal?.removeEventListener('abort', onAbort);
      this.waiting.push(job);
      this.next();
    });
  }

  /** Holds the process while it waits, as a question does. */
  async warm(): Promise<void> {
    const thread = this.threads[0] ?? this.addThread();
    thread.worker.ref();
    await thread.ready;
    if (!thread.job) thread.worker.unref();
  }

  async stop(): Promise<void> {
    this.isStopped = true;
    for (const job of this.waiting.splice(0)) this.settle(job, () => job.reject(failed('the solver has been stopped')));
    await Promise.all([...this.threads].map((thread) => this.end(thread, failed('the solver has been stopped'))));
  }

  private addThread(): Thread {
    const worker = new Worker(new URL('./solver-worker.mjs', import.meta.url), { execArgv: [] });
    const thread: Thread = { worker, ready: Promise.resolve(), job: null, idle: null };
    thread.ready = new Promise((resolve) => {
      worker.on('message', (message: Message) => {
        if (message.kind === 'ready') resolve();
        else this.receive(thread, message);
      });
      worker.once('exit', () => {
        resolve();
        void this.end(thread, failed('its thread ended'));
      });
    });
    worker.on('error', (error) => void this.end(thread, failed(error.message)));
    worker.unref();
    this.threads.push(thread);
    return thread;
  }

  private next(): void {
    const job = this.waiting[0];
    if (!job) return;
    const idle = this.threads.find((thread) => !thread.job);
    const thread = idle ?? (this.threads.length < this.size ? this.addThread() : undefined);
    if (!thread) return;
    this.waiting.shift();
    this.start(thread, job);
  }

  private start(thread: Thread, job: Job): void {
    const { lpText, options, variations } = job.task;
    const { signal: _signal, onProgress, ...plain } = options;
    thread.idle?.abort();
    thread.job = job;
    thread.worker.ref();
    const count = variations?.length ?? 1;
    const seconds = (options.timeLimitSeconds ?? DEFAULT_TIME_LIMIT_SECONDS) * count + GRACE_SECONDS;
    const timer = setTimeout(
      () => void this.end(thread, failed('it overran its time limit')),
      Math.min(seconds * 1000, 2 ** 31 - 1),
    );
    const release = job.release;
    job.release = () => {
      clearTimeout(timer);
      release();
    };
    thread.worker.postMessage({ lpText, options: plain, variations, hasProgress: onProgress !== undefined });
  }

  private receive(thread: Thread, message: Exclude<Message, { kind: 'ready' }>): void {
    const job = thread.job;
    if (!job) return;
    if (message.kind === 'progress') {
      job.task.options.onProgress?.(message.progress);
      return;
    }
    thread.job = null;
    thread.worker.unref();
    if (this.threads.indexOf(thread) > 0) {
      thread.idle = new AbortController();
      sleep(IDLE_MILLISECONDS, undefined, { ref: false, signal: thread.idle.signal }).then(
        () => this.end(thread, failed('its thread was idle')),
        () => undefined,
      );
    }
    if (message.kind === 'answer') this.settle(job, () => job.resolve(message.answer));
    else this.settle(job, () => job.reject(failed(message.message)));
    this.next();
  }

  private settle(job: Job, how: () => void): void {
    job.release();
    how();
  }

  /** A solve runs in one go inside its thread: to cancel it, the thread is ended and a new one takes its place. */
  private abandon(job: Job, reason: Error): void {
    const place = this.waiting.indexOf(job);
    if (place >= 0) {
      this.waiting.splice(place, 1);
      this.settle(job, () => job.reject(reason));
      return;
    }
    const thread = this.threads.find((each) => each.job === job);
    if (thread) void this.end(thread, reason);
  }

  private async end(thread: Thread, reason: Error): Promise<void> {
    const place = this.threads.indexOf(thread);
    if (place < 0) return;
    this.threads.splice(place, 1);
    thread.idle?.abort();
    const job = thread.job;
    thread.job = null;
    if (job) this.settle(job, () => job.reject(reason));
    if (!this.isStopped) this.next();
    await thread.worker.terminate();
  }
}

/**
 * HiGHS in worker threads: the event loop stays free while it solves. Threads start at the first question and are
 * at most `size`; what comes beyond waits its turn. The first stays warm.
 */
export function createSolver({ size = 2 }: { size?: number } = {}): Solver {
  const pool = new SolverPool(size);
  return {
    solve: (lpText, options = {}) => pool.solve({ lpText, options }) as Promise<Solution>,
    solveVariations: (lpText, variations, options = {}) =>
      pool.solve({ lpText, options, variations }) as Promise<Solution[]>,
    warm: () => pool.warm(),
    stop: () => pool.stop(),
  };
}
