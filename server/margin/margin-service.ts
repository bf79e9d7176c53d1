import type { Basis, DayMargin } from '#shared/contracts/margin.ts';
import { formatDayTime } from '#shared/domain/words.ts';
import {
  findLatestAllocation,
  findPublishedAllocation,
  type AllocationRow,
} from '#server/allocation/allocation-queries.ts';
import { loadDayCutouts } from '#server/carcases/day-figures.ts';
import type { Deps } from '#server/deps.ts';
import { groupBy } from '#server/farm/group-by.ts';
import { readDayMoney } from './carcase-accounts.ts';
import { describeMargin, type Ledger } from './describe-margin.ts';
import { planEntries } from './plan-margin.ts';
import { readSoldDay } from './sold-margin.ts';

const SOLD =
  'What is sold so far, as it was paid and refunded; reservations as they are charged. Beef that is not sold yet brings nothing, while its carcase is paid for whole.';

/** The margin of a cutting day, by the plan that is on sale, else by the newest. Null without a plan. */
export async function getDayMargin({ db }: Deps, dayId: string, basis: Basis): Promise<DayMargin | null> {
  const figures = await loadDayCutouts(db, dayId);
  const row = (await findPublishedAllocation(db, dayId)) ?? (await findLatestAllocation(db, dayId));
  if (!row) return null;
  const money = await readDayMoney(db, figures);
  const ledger =
    basis === 'sold'
      ? { ...(await readSoldDay(db, { figures, row, money })), restsOn: SOLD }
      : { entries: planEntries(row, money), boxes: plannedBoxes(row), restsOn: restsOn(row) };
  return describeMargin(figures, money, {
    ...ledger,
    basis,
    cutName: (cutId) => row.input.input.cuts.find(({ id }) => id === cutId)?.name ?? cutId,
  });
}

function restsOn({ state, createdAt }: AllocationRow): string {
  const plan = state === 'published' ? 'The plan that is on sale' : 'The newest plan, not on sale yet';
  return `${plan}, of ${formatDayTime(createdAt)}, as if all of it were sold.`;
}

function plannedBoxes(row: AllocationRow): Ledger['boxes'] {
  const kinds = groupBy(row.plan.plan.boxes, ({ kindId }) => kindId);
  return [...kinds].map(([boxKindId, variants]) => {
    const variant = row.input.input.boxes.find(({ kindId }) => kindId === boxKindId);
    return {
      boxKindId,
      name: variants[0]?.name ?? boxKindId,
      boxes: variants.reduce((sum, { boxes }) => sum + boxes, 0),
      pricePence: variant?.pricePence ?? 0,
      packagingPence: variant?.packagingPence ?? 0,
    };
  });
}
