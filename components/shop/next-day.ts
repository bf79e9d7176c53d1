type Day = { id: string; day: string; isInTime: boolean };

/** The day that the shop speaks of first: the next one that can still be ordered for, else the last one known. */
export function nextDayOf<D extends Day>(days: readonly D[]): D | undefined {
  const sorted = [...days].sort((one, other) => one.day.localeCompare(other.day));
  return sorted.find((day) => day.isInTime) ?? sorted[sorted.length - 1];
}
