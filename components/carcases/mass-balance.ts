import type { CutoutNode } from '#shared/contracts/carcases.ts';

export type MassBalance = {
  wholeGrams: number;
  parts: { kind: CutoutNode['kind']; grams: number }[];
  /** What stands on the hook less what the lines add up to: zero unless scales disagree. */
  differenceGrams: number;
};

const PARTS = ['cut', 'trim', 'bone', 'fat', 'loss'] as const satisfies readonly CutoutNode['kind'][];

/** Adds the lines up by what they are and holds them against the whole carcase, to the gram. */
export function balanceOf(nodes: readonly CutoutNode[]): MassBalance {
  const wholeGrams = nodes.find((node) => node.level === 'carcase')?.grams ?? 0;
  const lines = nodes.filter((node) => node.level === 'line');
  const parts = PARTS.map((kind) => ({
    kind,
    grams: lines.filter((line) => line.kind === kind).reduce((sum, line) => sum + line.grams, 0),
  }));
  return { wholeGrams, parts, differenceGrams: wholeGrams - parts.reduce((sum, part) => sum + part.grams, 0) };
}
