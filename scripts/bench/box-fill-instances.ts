import type { RecipeLine } from '#shared/engine/allocation/allocation-input.ts';
import type { BoxFillInput, BoxToFill, WeighedPack } from '#shared/engine/box-fill/box-fill-types.ts';
import { seededNumbers } from './allocation-instances.ts';

type CutRow = readonly [id: string, minGrams: number, maxGrams: number];
type LineRow = readonly [id: string, cuts: readonly string[], packs: number, min: number, max: number];

const CUTS: readonly CutRow[] = [
  ['mince', 400, 550],
  ['diced-beef', 400, 550],
  ['braising-steak', 400, 550],
  ['shin-slices', 400, 600],
  ['sirloin-steak', 400, 560],
  ['rump-steak', 400, 600],
  ['topside-joint', 900, 1_500],
  ['silverside-joint', 900, 1_500],
  ['brisket-joint', 900, 1_600],
];

/** Twelve packs a box: packs of each line as the recipe has them, with its least and most grams. */
const LINES: readonly LineRow[] = [
  ['mince', ['mince'], 4, 1_650, 2_150],
  ['dice', ['diced-beef'], 2, 820, 1_080],
  ['braise', ['braising-steak', 'shin-slices'], 2, 820, 1_150],
  ['steaks', ['sirloin-steak', 'rump-steak'], 2, 820, 1_150],
  ['roast', ['topside-joint', 'silverside-joint'], 1, 900, 1_500],
  ['slow', ['brisket-joint', 'silverside-joint'], 1, 900, 1_600],
];
const GUARANTEED_GRAMS = 7_200;

function toLine([id, cutIds, packs, minGrams, maxGrams]: LineRow): RecipeLine {
  return { id, name: id, cutIds, minGrams, maxGrams, minPacks: packs, maxPacks: packs, state: 'either' };
}

/** Pack weights as hands make them: the sum of three uniform draws, within the cut's limits. */
function makePack(id: string, [cutId, minGrams, maxGrams]: CutRow, next: () => number): WeighedPack {
  const share = (next() + next() + next()) / 3;
  return { id, cutId, grams: Math.round(minGrams + share * (maxGrams - minGrams)), state: 'fresh' };
}

/** So many boxes of twelve packs from six lines, and the packs for them with `spare` more of each (0.1 is a tenth). */
export function makeFillInstance(about: { boxes: number; seed: number; spare?: number }): BoxFillInput {
  const next = seededNumbers(about.seed);
  const recipe = { guaranteedGrams: GUARANTEED_GRAMS, lines: LINES.map(toLine) };
  const boxes = Array.from({ length: about.boxes }, (_, index): BoxToFill => {
    return { id: `box-${String(index + 1).padStart(4, '0')}`, recipe, earlierGiveAwayGrams: Math.floor(next() * 400) };
  });
  const packs = LINES.flatMap(([lineId, cutIds, count]) => {
    const wanted = Math.ceil(about.boxes * count * (1 + (about.spare ?? 0.1)));
    return Array.from({ length: wanted }, (_, index) => {
      const cut = CUTS.find(([id]) => id === cutIds[index % cutIds.length]);
      if (!cut) throw new RangeError('the line has no cut');
      return makePack(`${lineId}-${String(index + 1).padStart(5, '0')}`, cut, next);
    });
  });
  return { boxes, packs, kept: [], seed: about.seed };
}
