import type { Animal } from '#shared/contracts/herd.ts';
import { formatDay, formatDayWithYear } from '#shared/domain/words.ts';

/** Where an animal stands in its life on the farm, in a few words. */
export function describeAnimal(animal: Animal): { kind: 'free' | 'held' | 'sold' | 'quiet'; words: string } {
  const { carcase, withdrawalClearDay } = animal;
  if (carcase?.state === 'booked') return { kind: 'held', words: `booked for ${formatDay(carcase.killDay)}` };
  if (carcase) return { kind: 'sold', words: carcase.state };
  if (withdrawalClearDay) return { kind: 'held', words: `withdrawal to ${formatDayWithYear(withdrawalClearDay)}` };
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
