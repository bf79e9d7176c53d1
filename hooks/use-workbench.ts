import { useState } from 'react';
import type { Allocation, Lock } from '#shared/contracts/allocation.ts';
import { useAllocate, usePublishAllocation } from './allocation.ts';

export type ChosenPrimal = { carcaseId: string; side: 'left' | 'right'; primalId: string };

/** What the owner has in hand on the workbench: a primal, locks not yet worked out, and the answer before this one. */
export function useWorkbench(dayId: string, latest: Allocation | null) {
  const allocate = useAllocate();
  const publish = usePublishAllocation();
  const [chosen, setChosen] = useState<ChosenPrimal>();
  const [held, setHeld] = useState<{ of: string; locks: Lock[] }>();
  const [before, setBefore] = useState<Allocation | null>(null);
  const [publishedCount, setPublishedCount] = useState(0);
  // Locks in hand belong to the answer on which they were set; a newer answer brings its own.
  const locks = held && held.of === (latest?.id ?? '') ? held.locks : (latest?.locks ?? []);
  const workOut = async () => {
    publish.reset();
    try {
      await allocate.mutateAsync({ params: { dayId }, body: { locks } });
      setBefore(latest);
      setHeld(undefined);
    } catch {
      // The mutation keeps the refusal for the notice; the locks stay in hand.
    }
  };
  const putOnSale = async (plan: Allocation): Promise<boolean> => {
    try {
      await publish.mutateAsync({ params: { allocationId: plan.id }, body: { figuresVersion: plan.figuresVersion } });
      setPublishedCount(publishedCount + 1);
      return true;
    } catch {
      return false;
    }
  };
  return {
    allocate,
    publish,
    chosen,
    setChosen,
    locks,
    setLocks: (next: Lock[]) => setHeld({ of: latest?.id ?? '', locks: next }),
    before,
    workOut,
    putOnSale,
    hasPublished: publishedCount > 0,
  };
}
