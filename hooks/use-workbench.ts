import { useState } from 'react';
import type { Allocation, Lock } from '#shared/contracts/allocation.ts';
import { usePublishAllocation } from './allocation.ts';
import { usePlan } from './plan-jobs.ts';

export type ChosenPrimal = { carcaseId: string; side: 'left' | 'right'; primalId: string };

/** Time enough for a large day; a smaller one ends as soon as its answer is proven. */
export const USUAL_SECONDS = 60;

/** What the owner has in hand on the workbench: a primal, locks not yet worked out, and the answer before this one. */
export function useWorkbench(dayId: string, latest: Allocation | null) {
  const plan = usePlan();
  const publish = usePublishAllocation();
  const [chosen, setChosen] = useState<ChosenPrimal>();
  const [held, setHeld] = useState<{ of: string; locks: Lock[] }>();
  const [before, setBefore] = useState<Allocation | null>(null);
  const [seconds, setSeconds] = useState<number>(USUAL_SECONDS);
  const [publishedCount, setPublishedCount] = useState(0);
  // Locks in hand belong to the answer on which they were set; a newer answer brings its own.
  const locks = held && held.of === (latest?.id ?? '') ? held.locks : (latest?.locks ?? []);
  const workOut = () => {
    publish.reset();
    setBefore(latest);
    plan.start({ params: { dayId }, body: { locks, timeLimitSeconds: seconds } });
  };
  const putOnSale = async (row: Allocation): Promise<boolean> => {
    try {
      await publish.mutateAsync({ params: { allocationId: row.id }, body: { figuresVersion: row.figuresVersion } });
      setPublishedCount(publishedCount + 1);
      return true;
    } catch {
      return false;
    }
  };
  return {
    plan,
    publish,
    chosen,
    setChosen,
    locks,
    setLocks: (next: Lock[]) => setHeld({ of: latest?.id ?? '', locks: next }),
    seconds,
    setSeconds,
    /** Null until a newer answer has come. */
    before: before && before.id !== latest?.id ? before : null,
    workOut,
    putOnSale,
    hasPublished: publishedCount > 0,
  };
}
