import type { Deps } from '#server/deps.ts';

export function replanDay(_deps: Deps, _dayId: string): Promise<void> {
  return Promise.resolve();
}
