import { addMonths, ageInMonths, type Day } from '#shared/domain/day.ts';
import type { CarcaseFacts, VertebraeRule } from './cutout-types.ts';

/**
 * Older than so many calendar months: killed later than the day of birth moved on by them. Exactly thirty months is not
 * over thirty. A count of whole months would be wrong for the month that follows.
 */
export function isOlderThan(bornDay: Day, killDay: Day, months: number): boolean {
  return killDay > addMonths(bornDay, months);
}

export type Age = {
  ageMonths: number | null;
  isOverThirtyMonths: boolean;
  /** Why what keeps vertebral column is closed; null when it is open. */
  closedReason: string | null;
};

/**
 * Vertebral column of cattle over thirty months is specified risk material (Regulation (EC) 999/2001, annex V, as kept in
 * Great Britain): it is taken out in premises authorised for it. Whether the rule still stands is the premises' setting,
 * and the official veterinarian's word goes before ours. An animal whose birth is not known counts as over.
 */
export function judgeAge(carcase: Pick<CarcaseFacts, 'bornDay' | 'killDay'>, rule: VertebraeRule): Age {
  const { bornDay, killDay } = carcase;
  const isOverThirtyMonths = bornDay === null || isOlderThan(bornDay, killDay, rule.months);
  const isClosed = isOverThirtyMonths && rule.isActive && !rule.isPremisesAuthorised;
  const why = bornDay === null ? 'Day of birth not known, so' : `Over ${rule.months} months at kill, so`;
  return {
    ageMonths: bornDay === null ? null : ageInMonths(bornDay, killDay),
    isOverThirtyMonths,
    closedReason: isClosed ? `${why} vertebral column is taken out in authorised premises.` : null,
  };
}
