import type { CarcaseFacts, Cutout, CutoutNode, VertebraeRule } from '#shared/engine/cutout/cutout-types.ts';
import { cutout } from '#shared/engine/cutout/cutout.ts';
import type { Specification } from '#shared/engine/figures/specification.ts';
import { traditionalSide } from '#shared/engine/figures/traditional-side.ts';

/** An R4L steer of 24 months and 338 kg cold, cut on day 2, so that hanging takes nothing. */
export function makeCarcaseFacts(more: Partial<CarcaseFacts> = {}): CarcaseFacts {
  return {
    id: 'steer',
    type: 'steer',
    bornDay: '2024-11-20',
    killDay: '2026-11-24',
    liveGrams: null,
    hotGrams: null,
    coldGrams: 338_000,
    killingOutPpht: null,
    conformation: 'R',
    fatClass: '4L',
    hanging: { method: 'whole side', days: 2 },
    measured: {},
    ...more,
  };
}

export const activeRule: VertebraeRule = { isActive: true, months: 30, isPremisesAuthorised: false };

type Cutting = {
  specification?: Specification;
  rule?: VertebraeRule;
  ways?: { left?: Record<string, string>; right?: Record<string, string> };
};

export function cutCarcase(facts: Partial<CarcaseFacts> = {}, cutting: Cutting = {}): Cutout {
  return cutout({
    carcase: makeCarcaseFacts(facts),
    specification: cutting.specification ?? traditionalSide,
    rule: cutting.rule ?? activeRule,
    ways: { left: cutting.ways?.left ?? {}, right: cutting.ways?.right ?? {} },
  });
}

export function nodeAt(result: Cutout, path: string): CutoutNode {
  const node = result.nodes.find((one) => one.path === path);
  if (!node) throw new Error(`no node ${path}`);
  return node;
}

/** Paths of nodes whose parts and weighing difference do not add up to them, and of figures that are no whole grams. */
export function listLeaks(result: Cutout): string[] {
  return result.nodes
    .filter((node) => {
      const parts = result.nodes.filter((other) => other.parentPath === node.path);
      const sum = parts.reduce((total, part) => total + part.grams, 0);
      const isWhole = Number.isSafeInteger(node.grams) && node.grams >= 0;
      return !isWhole || (parts.length > 0 && sum + node.weighingDifferenceGrams !== node.grams);
    })
    .map((node) => node.path);
}
