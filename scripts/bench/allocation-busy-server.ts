// The real server, and beside it a control port of the bench: /busy keeps the solver's thread at work, /idle lets it rest.
import http from 'node:http';
import { createSolver } from '#server/allocation/solver/solver-pool.ts';
import { openSession } from '#shared/engine/allocation/allocate.ts';
import { solvePhases } from '#shared/engine/allocation/phases.ts';
import { makeAllocationInstance } from './allocation-instances.ts';
import '#server/main.ts';

const solver = createSolver({ size: 1 });
const input = makeAllocationInstance({ carcases: 8, seed: 4 });
let isBusy = false;
let work: Promise<void> = Promise.resolve();

/** One day after another, as long as it is wanted. */
async function keepSolving(): Promise<void> {
  while (isBusy) await solvePhases(openSession(input, solver, {}), new Map());
}

const control = http.createServer((request, response) => {
  const wanted = request.url === '/busy';
  const answer = () => response.end('done');
  if (wanted && !isBusy) {
    isBusy = true;
    work = keepSolving();
    answer();
  } else {
    isBusy = wanted;
    void work.then(answer);
  }
});
control.listen(Number(process.env.BENCH_CONTROL_PORT), '127.0.0.1');
