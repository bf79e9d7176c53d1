/** A quarter of the order is paid at once, to the next whole pound. */
const DEPOSIT_PERCENT = 25;
/** Below this a deposit is not worth a second charge. */
const SMALLEST_TOTAL_PENCE = 4_000;

/** What is paid now of an order whose rest is taken once it is packed; null where it has to be paid in full. */
export function depositOf(totalPence: number): number | null {
  if (totalPence < SMALLEST_TOTAL_PENCE) return null;
  return Math.ceil((totalPence * DEPOSIT_PERCENT) / 10_000) * 100;
}
