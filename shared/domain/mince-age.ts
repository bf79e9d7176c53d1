import { formatCount } from './words.ts';

/** What the premises do with meat that has hung longer than the usual limit: nothing, say so, or not mince it. */
export const MINCE_EFFECTS = ['none', 'caution', 'close'] as const;
export type MinceEffect = (typeof MINCE_EFFECTS)[number];

/**
 * How old meat may be when it is minced, in days from kill. The usual limits of approved premises (Regulation (EC)
 * 853/2004, annex III section V, as kept in Great Britain) are six days, and fifteen for boned, vacuum-packed beef;
 * retail shops that are registered only stand outside them.
 */
export type MinceAgeRule = { effect: MinceEffect; days: number; baggedDays: number };

export type MinceMeat = { name: string; daysFromKill: number; isBagged: boolean };
export type MinceVerdict = { closedReason: string | null; caution: string | null };

const ASK = 'Ask your local authority or the official veterinarian what applies to your premises.';

/** Whether the meat of a cutting day may be minced, by the oldest of its carcases; says which is too old. */
export function judgeMince(rule: MinceAgeRule, carcases: readonly MinceMeat[]): MinceVerdict {
  const tooOld = carcases.flatMap(({ name, daysFromKill: age, isBagged }) => {
    const limit = isBagged ? rule.baggedDays : rule.days;
    return age > limit ? [`${name} (${formatCount(age, 'day')} after kill, limit ${limit})`] : [];
  });
  if (rule.effect === 'none' || tooOld.length === 0) return { closedReason: null, caution: null };
  const named = `${tooOld.join(', ')}.`;
  if (rule.effect === 'close') {
    return { closedReason: `Mincing is closed for this day by your setting: ${named} ${ASK}`, caution: null };
  }
  return {
    closedReason: null,
    caution: `Older than the usual limit for mincing in approved premises: ${named} ${ASK}`,
  };
}
