import { addDays, type Day } from './day.ts';

export type Postcode = { outward: string; inward: string };

/** The two parts of a British postcode, with or without its space, in any letters; null where it is none. */
export function readPostcode(text: string): Postcode | null {
  const found = /^([A-Z]{1,2}\d[A-Z\d]?)(\d[A-Z]{2})$/.exec(text.replace(/\s/g, '').toUpperCase());
  return found ? { outward: found[1] ?? '', inward: found[2] ?? '' } : null;
}

/** `ZZ1 1AA`. */
export function formatPostcode({ outward, inward }: Postcode): string {
  return `${outward} ${inward}`;
}

function lettersOf({ outward }: Postcode): string {
  return /^[A-Z]+/.exec(outward)?.[0] ?? '';
}

/** `ZZ` covers all that begins with these letters, `ZZ1` that district alone and not ZZ11. */
function covers(prefix: string, postcode: Postcode): boolean {
  return prefix === postcode.outward || prefix === lettersOf(postcode);
}

/** The area whose prefix fits most closely; null when the van does not come there. */
export function findArea<A extends { prefixes: readonly string[] }>(areas: readonly A[], postcode: Postcode): A | null {
  const fit = (area: A) =>
    Math.max(0, ...area.prefixes.filter((prefix) => covers(prefix, postcode)).map((p) => p.length));
  const best = [...areas].sort((one, other) => fit(other) - fit(one))[0];
  return best && fit(best) > 0 ? best : null;
}

/** What the van costs: nothing from the area's threshold on, counted after a discount. */
export function deliveryPenceOf(
  area: { pricePence: number; freeFromPence: number | null },
  goodsPence: number,
): number {
  return area.freeFromPence !== null && goodsPence >= area.freeFromPence ? 0 : area.pricePence;
}

/** The first such weekday after the cutting day; 1 is Monday, 7 is Sunday. */
export function roundDay(cuttingDay: Day, weekday: number): Day {
  for (let after = 1; after < 7; after += 1) {
    const day = addDays(cuttingDay, after);
    if (weekdayOf(day) === weekday) return day;
  }
  return addDays(cuttingDay, 7);
}

function weekdayOf(day: Day): number {
  return ((new Date(`${day}T00:00:00Z`).getUTCDay() + 6) % 7) + 1;
}

/**
 * The collection point to go to instead, by a stated order and no map: one in the same postcode district, then one with
 * the same letters, then any; among equals by name.
 */
export function nearestPoint<P extends { name: string; addressLines: readonly string[] }>(
  points: readonly P[],
  postcode: Postcode,
): P | null {
  const rank = (point: P): number => {
    const own = readPostcode(point.addressLines.at(-1) ?? '');
    if (own?.outward === postcode.outward) return 0;
    return own && lettersOf(own) === lettersOf(postcode) ? 1 : 2;
  };
  return [...points].sort((a, b) => rank(a) - rank(b) || a.name.localeCompare(b.name))[0] ?? null;
}
