import { apportion } from '#shared/engine/apportion.ts';

/** Shares like packs over steps that sell at their own rates, first step first; grams go with the packs. */
export function sharePacks(
  made: { packs: number; grams: number },
  steps: readonly { count: number; rate: number }[],
): { packs: number; grams: number; rate: number }[] {
  let open = made.packs;
  const taken = steps.map(({ count, rate }) => {
    const packs = Math.min(open, count);
    open -= packs;
    return { packs, rate };
  });
  if (made.packs === 0) return [];
  const shares = taken.map(({ packs }, index) => ({ id: String(index).padStart(3, '0'), weight: packs }));
  const grams = apportion(made.grams, shares);
  return taken.map((each, index) => ({ ...each, grams: grams.get(String(index).padStart(3, '0')) ?? 0 }));
}
