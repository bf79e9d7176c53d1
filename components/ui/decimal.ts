/** How a whole number of the smallest unit is typed: grams as kilograms, pence as pounds, tenths of a penny per kg as £/kg, parts per 100,000 as %. */
export const UNITS = {
  kilograms: { scale: 1000, decimals: 3, atLeast: 0, before: '', after: 'kg' },
  pounds: { scale: 100, decimals: 2, atLeast: 2, before: '£', after: '' },
  poundsPerKg: { scale: 1000, decimals: 3, atLeast: 2, before: '£', after: '/kg' },
  percent: { scale: 1000, decimals: 3, atLeast: 0, before: '', after: '%' },
  count: { scale: 1, decimals: 0, atLeast: 0, before: '', after: '' },
} as const;

export type Unit = keyof typeof UNITS;

/** What was typed as a whole number of the smallest unit; null when empty, NaN when it is no such number. */
export function parseDecimal(text: string, unit: Unit): number | null {
  const { scale, decimals } = UNITS[unit];
  const plain = text.replace(/[\s,£]/g, '');
  if (plain === '') return null;
  const match = /^(-?)(\d{0,12})(?:\.(\d*))?$/.exec(plain);
  const [, sign = '', whole = '', fraction = ''] = match ?? [];
  if (!match || whole + fraction === '' || fraction.replace(/0+$/, '').length > decimals) return Number.NaN;
  const size = Number(whole) * scale + Number(fraction.slice(0, decimals).padEnd(decimals, '0'));
  return sign && size > 0 ? -size : size;
}

/** The other way: digits without a sign of the unit, as few decimals as tell the whole of it. */
export function writeDecimal(value: number | null, unit: Unit): string {
  if (value === null || Number.isNaN(value)) return '';
  const { scale, decimals, atLeast } = UNITS[unit];
  const [whole = '0', fraction = ''] = (Math.abs(value) / scale).toFixed(decimals).split('.');
  const kept = fraction.replace(/0+$/, '').padEnd(atLeast, '0');
  return `${value < 0 ? '-' : ''}${whole}${kept ? `.${kept}` : ''}`;
}
