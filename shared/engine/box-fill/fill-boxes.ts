import { checkBox, isAllowed } from './check-box.ts';
import type { BoxFill, BoxFillInput, BoxToFill, FilledBox, PlacedPack, WeighedPack } from './box-fill-types.ts';

/**
 * Packs to boxes in turn: each line takes the lightest packs that reach its least, then the box is topped up to its
 * guarantee with the pack that overshoots least. Boxes that cannot be filled keep no packs.
 */
export function fillBoxes(input: BoxFillInput): BoxFill {
  const used = new Set(input.kept.flatMap((box) => box.packs.map((pack) => pack.id)));
  const free = input.packs
    .filter((pack) => !used.has(pack.id))
    .sort((a, b) => a.grams - b.grams || (a.id < b.id ? -1 : 1));
  const left = new Set(free);
  const boxes = input.boxes.map((box): FilledBox => {
    const kept = input.kept.find((each) => each.boxId === box.id);
    const packs = kept ? [...kept.packs] : fillOne(box, [...left]);
    const check = checkBox(box.recipe, packs);
    if (!check.isFilled && !kept) return { ...check, boxId: box.id, packs: [] };
    for (const pack of free) if (packs.some((placed) => placed.id === pack.id)) left.delete(pack);
    return { ...check, boxId: box.id, packs };
  });
  const filled = boxes.filter((box) => box.isFilled);
  return {
    boxes,
    unusedPackIds: [...left].map((pack) => pack.id),
    giveAwayGrams: filled.reduce((sum, box) => sum + box.giveAwayGrams, 0),
    packedGrams: filled.reduce((sum, box) => sum + box.grams, 0),
    lowerBoundGrams: 0,
    unfilledBoxIds: boxes.filter((box) => !box.isFilled).map((box) => box.boxId),
  };
}

function fillOne(box: BoxToFill, free: WeighedPack[]): PlacedPack[] {
  const placed: PlacedPack[] = [];
  const take = (pack: WeighedPack, lineId: string) => {
    free.splice(free.indexOf(pack), 1);
    placed.push({ ...pack, lineId });
  };
  const inLine = (lineId: string) => placed.filter((pack) => pack.lineId === lineId);
  const gramsIn = (lineId: string) => inLine(lineId).reduce((sum, pack) => sum + pack.grams, 0);
  for (const line of box.recipe.lines) {
    while (inLine(line.id).length < line.minPacks || gramsIn(line.id) < line.minGrams) {
      const pack = free.find((each) => isAllowed(line, each) && gramsIn(line.id) + each.grams <= line.maxGrams);
      if (!pack || inLine(line.id).length >= (line.maxPacks ?? Infinity)) break;
      take(pack, line.id);
    }
  }
  for (;;) {
    const missing = box.recipe.guaranteedGrams - placed.reduce((sum, pack) => sum + pack.grams, 0);
    if (missing <= 0) return placed;
    const room = box.recipe.lines.filter((line) => inLine(line.id).length < (line.maxPacks ?? Infinity));
    const options = room.flatMap((line) =>
      free
        .filter((pack) => isAllowed(line, pack) && gramsIn(line.id) + pack.grams <= line.maxGrams)
        .map((pack) => ({ pack, lineId: line.id, over: Math.abs(pack.grams - missing) })),
    );
    const best = options.sort((a, b) => a.over - b.over)[0];
    if (!best) return placed;
    take(best.pack, best.lineId);
  }
}
