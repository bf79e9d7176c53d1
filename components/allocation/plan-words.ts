import type { Allocation, PlannedSide } from '#shared/contracts/allocation.ts';
import { shortEarTag } from '#shared/domain/ear-tag.ts';
import { ratePerKg } from '#shared/domain/money.ts';
import { formatCount, formatDay, formatKilograms, formatMoney, formatRate } from '#shared/domain/words.ts';

/** `Angus steer 00214, left`. */
export function nameSide({ title, earTag, side }: Pick<PlannedSide, 'title' | 'earTag' | 'side'>): string {
  return `${title} ${shortEarTag(earTag)}, ${side}`;
}

/** `Cutting day Thu 10 Dec · 2 carcases · 640 kg cold · 448 kg of product`. */
export function describePlan(plan: Pick<Allocation, 'day' | 'sides' | 'coldGrams' | 'productGrams'>): string {
  const carcases = new Set(plan.sides.map((side) => side.carcaseId)).size;
  return [
    `Cutting day ${formatDay(plan.day)}`,
    formatCount(carcases, 'carcase'),
    `${formatKilograms(plan.coldGrams)} cold`,
    `${formatKilograms(plan.productGrams)} of product`,
  ].join(' · ');
}

/** `£1.42/kg` of cold deadweight. */
export function perColdKg(pence: number, { coldGrams }: Pick<Allocation, 'coldGrams'>): string {
  return formatRate(coldGrams === 0 ? 0 : ratePerKg(pence, coldGrams));
}

export function leftOverGrams(plan: Pick<Allocation, 'cuts'>): number {
  return plan.cuts.reduce((sum, cut) => sum + cut.leftGrams, 0);
}

/** Boxes that publishing puts on sale: fewer than the plan makes while weights are estimates. */
export function boxesOnSale(plan: Pick<Allocation, 'boxes'>): number {
  return plan.boxes.reduce((sum, box) => sum + (box.promised ?? box.count), 0);
}

const QUARTERS: Record<string, string> = { side: 'Side', fore: 'Forequarter', hind: 'Hindquarter' };

/** What goes to a butcher, without the business that stands beside it anyway. */
export function nameTradeLine({ name, businessName }: Allocation['trade'][number]): string {
  const bare = name.replace(`, ${businessName}`, '');
  return QUARTERS[bare] ?? bare;
}

/** `+ £41.20`, `− £18.60`, `no difference`. */
export function signedMoney(pence: number): string {
  if (pence === 0) return 'no difference';
  return `${pence > 0 ? '+' : '−'} ${formatMoney(Math.abs(pence))}`;
}
