/**
 * Official British ear tag: `UK`, six digits of the herd, one check digit, five digits of the animal.
 * Check digit = (herd x 100000 + animal) mod 7 + 1; the published series for herd 123450 (600001, 700002, 100003) bears it out.
 */
export function earTagCheckDigit(herd: number, animal: number): number {
  return ((herd * 100_000 + animal) % 7) + 1;
}

/** Takes spaces and lower case as people type them; gives `UK123450600001`, or null when the form is wrong. */
export function normaliseEarTag(text: string): string | null {
  const tag = text.replace(/[\s-]/g, '').toUpperCase();
  return /^UK\d{12}$/.test(tag) ? tag : null;
}

export function hasValidCheckDigit(tag: string): boolean {
  const herd = Number(tag.slice(2, 8));
  const animal = Number(tag.slice(9));
  return earTagCheckDigit(herd, animal) === Number(tag.slice(8, 9));
}

/** As passports print it: `UK 123450 600001`. */
export function formatEarTag(tag: string): string {
  return `${tag.slice(0, 2)} ${tag.slice(2, 8)} ${tag.slice(8)}`;
}

/** The last five digits, by which an animal is known in the yard: `00214`. */
export function shortEarTag(tag: string): string {
  return tag.slice(-5);
}
