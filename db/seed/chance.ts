/** Numbers that look like chance and are the same on every run: the demo farm is told apart by nothing but its dates. */
export type Chance = {
  /** A whole number from `low` to `high`, both included. */
  between: (low: number, high: number) => number;
  pick: <T>(list: readonly T[]) => T;
};

/** Mulberry32: small, quick and good enough for a herd. */
export function makeChance(seed: number): Chance {
  let state = seed >>> 0;
  const next = () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), 1 | state);
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), 61 | mixed)) ^ mixed;
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4_294_967_296;
  };
  const between = (low: number, high: number) => low + Math.floor(next() * (high - low + 1));
  return {
    between,
    pick: (list) => {
      const picked = list[between(0, list.length - 1)];
      if (picked === undefined) throw new RangeError('nothing to pick from');
      return picked;
    },
  };
}
