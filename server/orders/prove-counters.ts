import type { Deps } from '#server/deps.ts';
import { log } from '#server/http/log.ts';
import { listCounterFaults, type CounterFault } from './counter-queries.ts';

/**
 * Stock counters are the one thing that is counted rather than summed. This proves that they equal the holds and the
 * order lines; a difference is a fault of ours and is logged as one.
 */
export async function proveCounters(deps: Deps): Promise<CounterFault[]> {
  const faults = await listCounterFaults(deps.db);
  for (const fault of faults) log.error({ fault }, 'a counter disagrees with its rows');
  return faults;
}
