import type { Take, Tissue, Way, WayLine } from './specification.ts';

const WHOLE = 100_000;

/** Parts per 100,000 of one primal's tissues; what is not named stays out of the product. */
export type Portion = { meat: number; fat?: number; bone?: number };

export type WayRecipe = {
  id: string;
  name: string;
  keepsVertebrae?: boolean;
  /** Beyond plain boning, tenths of a penny per kg of the primals; common practice. */
  extraTenthPencePerKg?: number;
  /** Cut or trim -> primal -> portion. */
  cuts: Readonly<Record<string, Readonly<Record<string, Portion>>>>;
  /** Meat that is trimmed away with the fat: primal -> parts per 100,000. */
  trimmedOff?: Readonly<Record<string, number>>;
};

const LEFT_OVER = ['fat', 'bone', 'loss'] as const satisfies readonly Tissue[];

/**
 * Writes a way out in full: fat, bone and loss that no product takes become lines of their own. Meat must be spoken for
 * to the last part; a recipe that leaves some, or takes more than there is, throws, since it is a slip in our own data.
 */
export function buildWay(primalIds: readonly string[], recipe: WayRecipe): Way {
  const rest = new Map(primalIds.map((id) => [id, { meat: WHOLE, fat: WHOLE, bone: WHOLE, loss: WHOLE }]));
  const take = (primalId: string, portion: Portion): Take => {
    const left = rest.get(primalId);
    if (!left) throw new RangeError(`${recipe.id}: ${primalId} is not covered by this choice`);
    const whole = { meat: portion.meat, fat: portion.fat ?? 0, bone: portion.bone ?? 0, loss: 0 };
    left.meat -= whole.meat;
    left.fat -= whole.fat;
    left.bone -= whole.bone;
    if (Math.min(left.meat, left.fat, left.bone) < 0) throw new RangeError(`${recipe.id}: ${primalId} is overdrawn`);
    return { primalId, ...whole };
  };
  const lines = Object.entries(recipe.cuts).map(([id, portions]): WayLine => ({
    id,
    kind: id.endsWith('trim') ? 'trim' : 'cut',
    takes: Object.entries(portions).map(([primalId, portion]) => take(primalId, portion)),
  }));
  const offcuts = new Map(
    Object.entries(recipe.trimmedOff ?? {}).map(([id, meat]) => [id, take(id, { meat }).meat] as const),
  );
  for (const [id, left] of rest) {
    if (left.meat !== 0) throw new RangeError(`${recipe.id}: ${left.meat} parts of the meat of ${id} go nowhere`);
  }
  return {
    id: recipe.id,
    name: recipe.name,
    keepsVertebrae: recipe.keepsVertebrae ?? false,
    extraTenthPencePerKg: recipe.extraTenthPencePerKg ?? 0,
    lines: [...lines, ...LEFT_OVER.map((tissue) => leftOverLine(tissue, rest, offcuts))],
  };
}

type Rest = ReadonlyMap<string, Record<Tissue, number>>;

/** The fat line also carries the meat that was trimmed away with it. */
function leftOverLine(tissue: (typeof LEFT_OVER)[number], rest: Rest, offcuts: ReadonlyMap<string, number>): WayLine {
  const takes = [...rest].map(([primalId, left]): Take => {
    const meat = tissue === 'fat' ? (offcuts.get(primalId) ?? 0) : 0;
    return { primalId, meat, fat: 0, bone: 0, loss: 0, [tissue]: left[tissue] };
  });
  return { id: tissue, kind: tissue, takes };
}
