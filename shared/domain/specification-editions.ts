type Edition = { name: string; edition: number; isRetired: boolean };

/** What a specification is now: the newest edition of each name, in the order given. */
export function newestEditions<E extends Edition>(list: readonly E[]): E[] {
  const newest = new Map<string, E>();
  for (const one of list) {
    if ((newest.get(one.name)?.edition ?? 0) < one.edition) newest.set(one.name, one);
  }
  return [...newest.values()];
}

/** What a new cutting day may be cut by: retired ones stay with the days that have them. */
export function editionsOnOffer<E extends Edition>(list: readonly E[]): E[] {
  return newestEditions(list).filter(({ isRetired }) => !isRetired);
}
