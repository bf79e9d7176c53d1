import type { AllocationInput } from '#shared/engine/allocation/allocation-input.ts';
import type { ChoiceSupply, WayYield } from '#shared/engine/cutout/cutout-types.ts';

function withWays(input: AllocationInput, pick: (choice: ChoiceSupply) => WayYield | undefined): AllocationInput {
  return {
    ...input,
    sides: input.sides.map((side) => ({
      ...side,
      choices: side.choices.map((choice) => {
        const way = pick(choice);
        return { ...choice, ways: way ? [way] : choice.ways };
      }),
    })),
  };
}

function openWays({ ways }: ChoiceSupply): WayYield[] {
  return ways.filter(({ closedReason }) => closedReason === null);
}

/** Every primal the way that the specification names first. */
export function traditionalWays(input: AllocationInput): AllocationInput {
  return withWays(input, (choice) => openWays(choice)[0]);
}

/** Every primal the way that brings most at list prices, whatever the boxes and orders want. */
export function dearestWays(input: AllocationInput): AllocationInput {
  const rates = new Map(input.cuts.map(({ id, tenthPencePerKg }) => [id, tenthPencePerKg]));
  const listPence = ({ yields, costPence }: WayYield) =>
    yields.reduce((sum, { cutId, grams }) => sum + (grams * (rates.get(cutId) ?? 0)) / 10_000, -costPence);
  return withWays(input, (choice) => openWays(choice).sort((a, b) => listPence(b) - listPence(a))[0]);
}
