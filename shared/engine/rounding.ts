/** Integer quotient, half away from zero. The only place where the engine rounds a product of integers. */
export function divideHalfAway(numerator: bigint, denominator: bigint): number {
  const sign = numerator < 0n !== denominator < 0n ? -1n : 1n;
  const top = numerator < 0n ? -numerator : numerator;
  const bottom = denominator < 0n ? -denominator : denominator;
  return Number(sign * ((2n * top + bottom) / (2n * bottom)));
}

/** `value x part / whole`, half away from zero, for safe integers. */
export function scale(value: number, part: number, whole: number): number {
  return divideHalfAway(BigInt(value) * BigInt(part), BigInt(whole));
}

/** A decimal number to a whole one, half away from zero. */
export function roundHalfAway(value: number): number {
  const rounded = Math.sign(value) * Math.floor(Math.abs(value) + 0.5);
  return rounded === 0 ? 0 : rounded;
}
