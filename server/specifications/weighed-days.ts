import { formatEarTag } from '#shared/domain/ear-tag.ts';
import type { CutoutNode } from '#shared/engine/cutout/cutout-types.ts';
import { cutout } from '#shared/engine/cutout/cutout.ts';
import { weighByPacks, type PackedCuts } from '#shared/engine/cutout/packed-lines.ts';
import type { Specification } from '#shared/engine/figures/specification.ts';
import { AppError } from '#shared/errors.ts';
import { findPublishedAllocation, type AllocationRow } from '#server/allocation/allocation-queries.ts';
import type { DayWithSpecification } from '#server/carcases/cutting-day-queries.ts';
import { loadDayCutouts, type CarcaseFigures, type WaysByCarcase } from '#server/carcases/day-figures.ts';
import { readPublishedWays } from '#server/carcases/published-plan.ts';
import type { Db, Tx } from '#server/deps.ts';
import { listPacks, readPlaces } from '#server/packs/pack-queries.ts';

export type WeighedCarcase = {
  id: string;
  earTag: string;
  title: string;
  /** Foreseen and weighed, packs among the scales; empty when `reason` is set. */
  nodes: CutoutNode[];
  /** Why this carcase says nothing of the specification; null when it does. */
  reason: string | null;
};

export type WeighedDay = { day: DayWithSpecification; carcases: WeighedCarcase[] };

/**
 * Foreseen against weighed of every carcase of a day: what the scales said of its parts, and its packs. With a
 * specification given, as that one would have foreseen it; else as the day's own edition did.
 */
export async function loadWeighedDay(db: Db | Tx, dayId: string, specification?: Specification): Promise<WeighedDay> {
  const ways = await readPublishedWays(db, dayId);
  const figures = await loadDayCutouts(db, dayId, ways);
  const published = await findPublishedAllocation(db, dayId);
  const packed = await readPacked(db, dayId, published);
  const carcases = figures.carcases.map((carcase): WeighedCarcase => {
    const { row } = carcase;
    const named = {
      id: row.id,
      earTag: formatEarTag(row.animal.earTag),
      title: `${row.animal.breed} ${row.animal.sex}`,
    };
    const nodes = cutAgain(carcase, specification ?? figures.specification, ways);
    if (typeof nodes === 'string') return { ...named, nodes: [], reason: nodes };
    const whole = leftWhole(nodes, { carcaseId: row.id, published });
    const weighed = weighByPacks(nodes, packed.get(row.id) ?? {}, whole);
    const isWeighed = weighed.some(({ level, source }) => source === 'weighed' && isBelowQuarter(level));
    return { ...named, nodes: weighed, reason: isWeighed ? null : 'Nothing of it was weighed below the quarters.' };
  });
  return { day: figures.day, carcases };
}

function isBelowQuarter(level: CutoutNode['level']): boolean {
  return level === 'primal' || level === 'line';
}

/** The nodes, or why there are none: a way or a cut that was weighed is no longer in this edition. */
function cutAgain(
  { facts, rule }: CarcaseFigures,
  specification: Specification,
  ways: WaysByCarcase,
): CutoutNode[] | string {
  try {
    return cutout({ carcase: facts, specification, rule, ways: ways[facts.id] ?? { left: {}, right: {} } }).nodes;
  } catch (error) {
    if (error instanceof AppError) return 'This edition does not foresee what was weighed of it.';
    throw error;
  }
}

function leftWhole(
  nodes: readonly CutoutNode[],
  { carcaseId, published }: { carcaseId: string; published: AllocationRow | null },
): Set<string> {
  const fates = published?.plan.plan.fates.filter((fate) => fate.carcaseId === carcaseId) ?? [];
  const sold = new Set(fates.flatMap((fate) => fate.soldPrimals.map(({ primalId }) => `${fate.side}/${primalId}`)));
  const primals = nodes.filter(({ level }) => level === 'primal');
  return new Set(
    primals.map(({ path }) => path).filter((path) => sold.has(`${path.split('/')[0]}/${path.split('/')[2]}`)),
  );
}

/** Packed grams by carcase and cut. A cut that partly went into mince is left out: its packs are not all of it. */
async function readPacked(
  db: Db | Tx,
  dayId: string,
  published: AllocationRow | null,
): Promise<Map<string, PackedCuts>> {
  const minced = new Set(
    published?.plan.plan.cuts.filter(({ mincedGrams }) => mincedGrams > 0).map(({ cutId }) => cutId),
  );
  const packs = await listPacks(db, dayId);
  const places =
    packs.length > 0
      ? await readPlaces(
          db,
          packs.map(({ id }) => id),
        )
      : new Map<string, { place: string }>();
  const packed = new Map<string, Record<string, number>>();
  for (const { id, carcaseId, cutId, grams } of packs) {
    // What was weighed twice never was a pack.
    if (minced.has(cutId) || places.get(id)?.place === 'carcase') continue;
    const cuts = packed.get(carcaseId) ?? {};
    packed.set(carcaseId, { ...cuts, [cutId]: (cuts[cutId] ?? 0) + grams });
  }
  return packed;
}
