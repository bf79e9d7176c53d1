export type Share = { id: string; weight: number | bigint };

/**
 * Splits `total` whole units in proportion to the weights by largest remainder; equal remainders go to the lower id.
 * The parts always sum to `total`, and the order of `shares` never matters.
 */
export function apportion(total: number, shares: readonly Share[]): Map<string, number> {
  if (!Number.isSafeInteger(total) || total < 0) throw new RangeError(`cannot apportion ${total}`);
  const sorted = shares
    .map(({ id, weight }) => ({ id, weight: BigInt(weight) }))
    .sort((a, b) => (a.id < b.id ? -1 : a.id > b.id ? 1 : 0));
  const sum = sorted.reduce((all, { weight }) => all + weight, 0n);
  if (sorted.some(({ weight }) => weight < 0n)) throw new RangeError('a weight is negative');
  if (sum === 0n) throw new RangeError('all weights are zero');
  const parts = sorted.map(({ id, weight }) => {
    const product = BigInt(total) * weight;
    return { id, units: Number(product / sum), remainder: product % sum };
  });
  let left = total - parts.reduce((all, part) => all + part.units, 0);
  const byRemainder = [...parts].sort((a, b) => (a.remainder < b.remainder ? 1 : a.remainder > b.remainder ? -1 : 0));
  for (const part of byRemainder) {
    if (left === 0) break;
    part.units += 1;
    left -= 1;
  }
  return new Map(parts.map(({ id, units }) => [id, units]));
}
