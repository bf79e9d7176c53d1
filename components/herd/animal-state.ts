import type { Animal } from '#shared/contracts/herd.ts';
import type { Day } from '#shared/domain/day.ts';
import { formatDay, formatDayWithYear } from '#shared/domain/words.ts';

/** The first day without a running withdrawal period; null when none runs. Until today is known, every one counts. */
export function runningWithdrawal({ withdrawalClearDay }: Animal, today: Day | undefined): Day | null {
  return withdrawalClearDay && (today === undefined || withdrawalClearDay > today) ? withdrawalClearDay : null;
}

/** Where an animal stands in its life on the farm, in a few words. */
export function describeAnimal(
  animal: Animal,
  today: Day | undefined,
): { kind: 'free' | 'held' | 'sold' | 'quiet'; words: string } {
  const { carcase } = animal;
  const clearDay = runningWithdrawal(animal, today);
  if (carcase?.state === 'booked') return { kind: 'held', words: `booked for ${formatDay(carcase.killDay)}` };
  if (carcase) return { kind: 'sold', words: carcase.state };
  if (clearDay) return { kind: 'held', words: `withdrawal to ${formatDayWithYear(clearDay)}` };
  return { kind: 'free', words: 'in the field' };
}

/** Finds by any part of the tag, with or without spaces, or by breed. */
export function findAnimals(animals: readonly Animal[], typed: string): Animal[] {
  const wanted = typed.trim().toLowerCase();
  const digits = wanted.replace(/\s/g, '');
  return animals.filter(
    (animal) => animal.earTag.toLowerCase().includes(digits) || animal.breed.toLowerCase().includes(wanted),
  );
}
