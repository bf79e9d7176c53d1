import { butcheryByCarcase, planSales } from '#shared/engine/margin/plan-sales.ts';
import { shareCarcases } from '#shared/engine/margin/share-carcases.ts';
import type { MarginEntry } from '#shared/engine/margin/margin-types.ts';
import type { AllocationRow } from '#server/allocation/allocation-queries.ts';
import type { DayMoney } from './carcase-accounts.ts';

/** The ledger of an allocation, as if all that it offers were sold at the prices that it was solved with. */
export function planEntries(
  row: Pick<AllocationRow, 'cuttingDayId' | 'input' | 'plan'>,
  money: DayMoney,
): MarginEntry[] {
  const { input } = row.input;
  const { plan } = row.plan;
  const butchery = butcheryByCarcase(input, plan);
  const accounts = money.carcases.map(({ carcaseId, coldGrams, deadweightPence, costs }) => ({
    carcaseId,
    coldGrams,
    deadweightPence,
    costs: { ...costs, butcheryPence: butchery.get(carcaseId) ?? 0 },
  }));
  return shareCarcases(row.cuttingDayId, planSales(input, plan, money.cardFee), accounts);
}
