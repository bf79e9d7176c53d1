import type { Fill } from '#shared/contracts/packs.ts';
import { shortEarTag } from '#shared/domain/ear-tag.ts';
import { formatCount, formatWeight } from '#shared/domain/words.ts';

/** `Steaks: 0.4 kg and 1 pack missing`. */
export function missingWords({ line, shortGrams, shortPacks }: Fill['missing'][number]): string {
  const parts = [
    shortGrams > 0 ? formatWeight(shortGrams) : '',
    shortPacks > 0 ? formatCount(shortPacks, 'pack') : '',
  ].filter(Boolean);
  return `${line}: ${parts.length > 0 ? `${parts.join(' and ')} missing` : 'no fit found'}`;
}

export function fillState({ isFilled, isPacked }: Pick<Fill, 'isFilled' | 'isPacked'>): string {
  if (isFilled) return 'filled';
  return isPacked ? 'packed short' : 'not filled';
}

/** `Hearth, 2nd of this order` when an order holds several of one kind. */
export function nameItem({ item, copy }: Pick<Fill, 'item' | 'copy'>): string {
  return copy > 1 ? `${item}, no. ${copy}` : item;
}

/** `Angus steer 00214`: two of one breed may hang side by side. */
export function nameCarcase({ title, earTag }: { title: string; earTag: string }): string {
  return `${title} ${shortEarTag(earTag)}`;
}

/** What cannot be filled stands first: it is what somebody has to do something about. */
export function unfilledFirst(fills: readonly Fill[]): Fill[] {
  return fills.toSorted((a, b) => Number(a.isFilled) - Number(b.isFilled) || a.orderNo - b.orderNo || a.copy - b.copy);
}
