import type { RecipeLine } from '#shared/engine/allocation/allocation-input.ts';
import type { WeighedPack } from './box-fill-types.ts';

function isBefore(a: WeighedPack, b: WeighedPack): boolean {
  return a.grams !== b.grams ? a.grams < b.grams : a.id < b.id;
}

/** First place whose pack is not before the given weight and id. */
function placeOf(packs: readonly WeighedPack[], grams: number, id: string): number {
  let low = 0;
  let high = packs.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    const pack = packs[middle];
    if (pack && (pack.grams !== grams ? pack.grams < grams : pack.id < id)) low = middle + 1;
    else high = middle;
  }
  return low;
}

/** Packs that are in no box, by cut and state, light to heavy. */
export class PackShelf {
  private readonly heaps = new Map<string, WeighedPack[]>();

  private heap(pack: Pick<WeighedPack, 'cutId' | 'state'>): WeighedPack[] {
    const key = `${pack.cutId} ${pack.state}`;
    const known = this.heaps.get(key);
    if (known) return known;
    const empty: WeighedPack[] = [];
    this.heaps.set(key, empty);
    return empty;
  }

  add(pack: WeighedPack): void {
    const heap = this.heap(pack);
    heap.splice(placeOf(heap, pack.grams, pack.id), 0, pack);
  }

  remove(pack: WeighedPack): void {
    const heap = this.heap(pack);
    const place = placeOf(heap, pack.grams, pack.id);
    if (heap[place]?.id !== pack.id) throw new RangeError(`pack ${pack.id} is not on the shelf`);
    heap.splice(place, 1);
  }

  /** The heaps that a line may take from. */
  heapsFor(line: RecipeLine): readonly (readonly WeighedPack[])[] {
    const states = line.state === 'either' ? (['fresh', 'frozen'] as const) : [line.state];
    return line.cutIds.flatMap((cutId) =>
      states.flatMap((state) => {
        const heap = this.heaps.get(`${cutId} ${state}`);
        return heap && heap.length > 0 ? [heap] : [];
      }),
    );
  }

  /** The lightest pack of at least `least` and at most `most` grams that the line allows. */
  lightest(line: RecipeLine, least: number, most: number): WeighedPack | null {
    let best: WeighedPack | null = null;
    for (const heap of this.heapsFor(line)) {
      const pack = heap[placeOf(heap, least, '')];
      if (pack && pack.grams <= most && (!best || isBefore(pack, best))) best = pack;
    }
    return best;
  }

  /** The pack nearest to a weight, not above `most`; the lighter of two that are equally near. */
  nearest(line: RecipeLine, grams: number, most: number): WeighedPack | null {
    let best: WeighedPack | null = null;
    const off = (pack: WeighedPack) => Math.abs(pack.grams - grams);
    for (const heap of this.heapsFor(line)) {
      const place = placeOf(heap, grams, '');
      for (const pack of [heap[place - 1], heap[place]]) {
        if (!pack || pack.grams > most) continue;
        if (!best || off(pack) < off(best) || (off(pack) === off(best) && isBefore(pack, best))) best = pack;
      }
    }
    return best;
  }

  all(): WeighedPack[] {
    return [...this.heaps.keys()].sort().flatMap((key) => this.heaps.get(key) ?? []);
  }
}
