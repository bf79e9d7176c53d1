import type { CarcaseSummary } from '#shared/contracts/carcases.ts';
import { shortEarTag } from '#shared/domain/ear-tag.ts';
import { formatCount } from '#shared/domain/words.ts';

/** `Steer 00214`. */
export function nameCarcase({ sex, earTag }: Pick<CarcaseSummary, 'sex' | 'earTag'>): string {
  return `${sex.charAt(0).toUpperCase()}${sex.slice(1)} ${shortEarTag(earTag)}`;
}

/** `R 4L`, or that no class was given. */
export function describeClass({ conformation, fatClass }: Pick<CarcaseSummary, 'conformation' | 'fatClass'>): string {
  const given = [conformation, fatClass].filter(Boolean).join(' ');
  return given || 'not classified';
}

/** Class, age and hanging in one line. */
export function describeCarcase(carcase: CarcaseSummary): string {
  return [
    carcase.breed,
    describeClass(carcase),
    `${formatCount(carcase.ageMonths, 'month')}${carcase.isOverThirtyMonths ? ' (over thirty)' : ''}`,
    carcase.hungDays > 0 ? `hung ${formatCount(carcase.hungDays, 'day')}` : 'not hung yet',
  ].join(' · ');
}
