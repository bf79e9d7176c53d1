import type { AllocationInput, MeatState } from '#shared/engine/allocation/allocation-input.ts';
import type { AllocationPlan } from '#shared/engine/allocation/allocation-plan.ts';
import type { SideSupply } from '#shared/engine/cutout/cutout-types.ts';
import type { PromiseInput, Spread } from './promise-types.ts';
import { hashText, normalOf } from './seeded-normal.ts';

/** Grams by `<cut>/<state>`. */
export type Supply = Map<string, number>;

export const supplyKey = (cutId: string, state: MeatState) => `${cutId}/${state}`;

/** Something that weighs more or less than foreseen: its foreseen grams, and which two draws it hangs on. */
type Uncertain = { grams: number; dayKey: number; carcaseKey: number };
type UncertainLine = Uncertain & { supplyKey: string | null };
type UncertainPrimal = Uncertain & { lines: UncertainLine[] };
type UncertainSide = Uncertain & { spread: Spread; primals: UncertainPrimal[] };

export type Uncertainty = { sides: UncertainSide[]; stock: Supply };

const byId = <T>(items: readonly T[], id: (item: T) => string) =>
  [...items].sort((a, b) => (id(a) < id(b) ? -1 : id(a) > id(b) ? 1 : 0));

function draws(grams: number, carcaseId: string, what: string): Uncertain {
  return { grams, dayKey: hashText(`day ${what}`), carcaseKey: hashText(`${carcaseId} ${what}`) };
}

/** Lines of a primal that the plan cuts. What is bone, fat and loss stands as one line without a supply. */
function linesOf(side: SideSupply, primal: { primalId: string; grams: number }, plan: AllocationPlan): UncertainLine[] {
  const choice = side.choices.find(({ primals }) => primals.some(({ primalId }) => primalId === primal.primalId));
  const fate = plan.fates.find((one) => one.sideId === side.id && one.choiceId === choice?.choiceId);
  const way = choice?.ways.find(({ wayId }) => wayId === fate?.wayId);
  const isSold = fate?.soldPrimals.some(({ primalId }) => primalId === primal.primalId) ?? false;
  if (!way || isSold) return [];
  const yields = byId(
    way.yields.filter(({ primalId }) => primalId === primal.primalId),
    ({ cutId }) => cutId,
  );
  const restGrams = primal.grams - yields.reduce((sum, { grams }) => sum + grams, 0);
  const line = (cutId: string, grams: number) => draws(grams, side.carcaseId, `${primal.primalId}/${cutId}`);
  return [
    ...yields.map(({ cutId, grams }) => ({ ...line(cutId, grams), supplyKey: supplyKey(cutId, 'fresh') })),
    { ...line('rest', Math.max(0, restGrams)), supplyKey: null },
  ];
}

/** What may turn out otherwise of the plan's meat. Primals that leave whole stay in, since they share their side's weight. */
export function readUncertainty({
  input,
  plan,
  spreads,
}: Pick<PromiseInput, 'input' | 'plan' | 'spreads'>): Uncertainty {
  const none: Spread = { carcasePpht: 0, primalPpht: 0, linePpht: 0 };
  const sides = byId(input.sides, ({ id }) => id).map((side): UncertainSide => {
    const primals = byId(
      side.choices.flatMap((choice) => choice.primals),
      ({ primalId }) => primalId,
    );
    return {
      ...draws(side.grams, side.carcaseId, 'carcase'),
      spread: spreads[side.carcaseId] ?? none,
      primals: primals.map((primal) => ({
        ...draws(primal.grams, side.carcaseId, primal.primalId),
        lines: linesOf(side, primal, plan),
      })),
    };
  });
  return { sides, stock: readStock(input) };
}

function readStock(input: AllocationInput): Supply {
  const stock: Supply = new Map();
  for (const { cutId, state, grams } of input.stock) {
    const key = supplyKey(cutId, state);
    stock.set(key, (stock.get(key) ?? 0) + grams);
  }
  return stock;
}

type Luck = { seed: number; scenario: number };

/**
 * Log-normal with mean 1. Half of the variance is the day's, which every carcase shares (one cutter, one recipe of
 * trimming), half the carcase's own.
 */
function factor({ dayKey, carcaseKey }: Uncertain, spreadPpht: number, { seed, scenario }: Luck): number {
  if (spreadPpht === 0) return 1;
  const variance = Math.log(1 + (spreadPpht / 100_000) ** 2);
  const normal = (normalOf(seed, scenario, dayKey) + normalOf(seed, scenario, carcaseKey)) * Math.SQRT1_2;
  return Math.exp(Math.sqrt(variance) * normal - variance / 2);
}

/** Each part off by its own luck, then all brought back to what their parent weighs. */
function within<T extends Uncertain>(parts: readonly T[], total: number, off: (part: T) => number): [T, number][] {
  const drawn = parts.map((part): [T, number] => [part, part.grams * off(part)]);
  const sum = drawn.reduce((all, [, grams]) => all + grams, 0);
  return drawn.map(([part, grams]) => [part, sum > 0 ? (grams * total) / sum : 0]);
}

/** What the day gives in one scenario, cut as planned, with the stock at hand. Fractions of grams stay. */
export function drawSupply({ sides, stock }: Uncertainty, luck: Luck): Supply {
  const supply: Supply = new Map(stock);
  for (const side of sides) {
    const grams = side.grams * factor(side, side.spread.carcasePpht, luck);
    const primals = within(side.primals, grams, (primal) => factor(primal, side.spread.primalPpht, luck));
    for (const [primal, primalGrams] of primals) {
      const lines = within(primal.lines, primalGrams, (line) => factor(line, side.spread.linePpht, luck));
      for (const [line, lineGrams] of lines) {
        if (line.supplyKey) supply.set(line.supplyKey, (supply.get(line.supplyKey) ?? 0) + lineGrams);
      }
    }
  }
  return supply;
}
