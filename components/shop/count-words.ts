const NUMBERS = [
  'no',
  'one',
  'two',
  'three',
  'four',
  'five',
  'six',
  'seven',
  'eight',
  'nine',
  'ten',
  'eleven',
  'twelve',
];

/** `three`; figures from thirteen on. */
export function numberWord(count: number): string {
  return NUMBERS[count] ?? String(count);
}

/** `Three` at the head of a sentence. */
export function capitalised(words: string): string {
  return words.charAt(0).toUpperCase() + words.slice(1);
}

/** `three weeks`, `24 days`. */
export function hungWords(days: number): string {
  const weeks = days / 7;
  if (days > 0 && Number.isInteger(weeks)) return `${numberWord(weeks)} ${weeks === 1 ? 'week' : 'weeks'}`;
  return `${days} ${days === 1 ? 'day' : 'days'}`;
}
