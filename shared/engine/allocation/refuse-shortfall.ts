import { EngineError } from '#shared/engine/engine-error.ts';
import type { Shortfall } from './allocation-plan.ts';

/**
 * A plan that cannot meet what is confirmed is an answer to look at, never one to put on sale: refused with
 * CONFIRMED_EXCEEDS_STOCK, naming everything that is short, the first to be settled first.
 */
export function refuseShortfall(shortfalls: readonly Shortfall[]): void {
  const [first] = shortfalls;
  if (!first) return;
  const named = shortfalls.map(({ name, short, unit }) => `${name} (${short} ${unit} short)`).join(', ');
  throw new EngineError(
    'CONFIRMED_EXCEEDS_STOCK',
    `More is confirmed than this day gives: ${named}. Nothing was published; settle those orders first.`,
    { node: `${first.kind}/${first.id}`, figures: { short: first.short, unit: first.unit, named: shortfalls.length } },
  );
}
