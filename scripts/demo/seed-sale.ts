import { allocateDay, publishAllocation } from '#server/allocation/allocation-service.ts';
import type { Deps } from '#server/deps.ts';
import type { SeededDay } from './seed-days.ts';

/** Works a day out and puts the answer on sale, as the owner does in the workbench. */
export async function openSale(deps: Deps, day: SeededDay, ownerId: string): Promise<string> {
  const row = await allocateDay(deps, { dayId: day.id, locks: [] });
  await publishAllocation(deps, { allocationId: row.id, figuresVersion: row.figuresVersion, byUserId: ownerId });
  return row.id;
}
