import type { Pack, PackingDay } from '#shared/contracts/packs.ts';
import { formatEarTag } from '#shared/domain/ear-tag.ts';
import type { Recipe } from '#shared/engine/allocation/allocation-input.ts';
import { AppError } from '#shared/errors.ts';
import { findPublishedAllocation, type AllocationRow } from '#server/allocation/allocation-queries.ts';
import { loadDayCutouts, type CarcaseFigures, type DayCutouts } from '#server/carcases/day-figures.ts';
import { readPublishedWays } from '#server/carcases/published-plan.ts';
import type { Db, Tx } from '#server/deps.ts';
import { describeFill, listJobs, type Job } from './fill-work.ts';
import {
  listAssignments,
  listFrozenPacks,
  listOrderWork,
  listPacks,
  listTradeWork,
  readPlaces,
  type PackRow,
} from './pack-queries.ts';

/** `isFrozen`: out of the freezer, where it was put on an earlier day. */
export type WorkPack = PackRow & { place: string; isAssigned: boolean; isFrozen: boolean };
export type PackingWork = { jobs: Job[]; packs: WorkPack[] };

/**
 * All packs of a day and the frozen ones of earlier days that nobody has or that lie in an order of this day, where they
 * lie, and all that they must fill.
 */
export async function loadWork(db: Db | Tx, dayId: string): Promise<PackingWork> {
  const published = await findPublishedAllocation(db, dayId);
  const frozen = await listFrozenPacks(db, dayId);
  const frozenIds = new Set(frozen.map((pack) => pack.id));
  const packs = [...(await listPacks(db, dayId)), ...frozen];
  const ids = packs.map((pack) => pack.id);
  const assignments = ids.length > 0 ? await listAssignments(db, ids) : [];
  const places = ids.length > 0 ? await readPlaces(db, ids) : new Map<string, { place: string }>();
  const jobs = listJobs({
    orders: await listOrderWork(db, dayId),
    trade: await listTradeWork(db, dayId),
    packs,
    assignments,
    recipes: recipesOf(published),
  });
  const assigned = new Set(assignments.map((row) => row.packId));
  const inJobs = new Set(jobs.flatMap((job) => job.packs.map((pack) => pack.id)));
  const placed = packs.map((pack) => ({
    ...pack,
    place: places.get(pack.id)?.place ?? 'chiller',
    isAssigned: assigned.has(pack.id),
    isFrozen: frozenIds.has(pack.id),
  }));
  const isHere = ({ id, place, isFrozen, isAssigned }: WorkPack) =>
    !isFrozen || inJobs.has(id) || (place === 'freezer' && !isAssigned);
  return { jobs, packs: placed.filter(isHere) };
}

function recipesOf(published: AllocationRow | null): Map<string, Recipe> {
  return new Map((published?.input.input.boxes ?? []).map((box) => [box.kindId, box]));
}

export async function readPackingDay(db: Db | Tx, dayId: string): Promise<PackingDay> {
  const figures = await loadDayCutouts(db, dayId, await readPublishedWays(db, dayId));
  const { jobs, packs } = await loadWork(db, dayId);
  const published = await findPublishedAllocation(db, dayId);
  return {
    dayId,
    day: figures.day.day,
    carcases: figures.carcases.map(({ row }) => ({
      id: row.id,
      earTag: formatEarTag(row.animal.earTag),
      title: `${row.animal.breed} ${row.animal.sex}`,
      state: row.state,
    })),
    cuttingList: figures.carcases.flatMap((carcase) => listCuts(carcase, { figures, published, packs })),
    // What lies in the freezer unasked for is no pack of this day.
    packs: packs.filter((pack) => !pack.isFrozen || pack.isAssigned).map((pack) => describePack(pack, jobs)),
    fills: jobs.map(describeFill),
  };
}

export function describePack(pack: PackRow & { place: string }, jobs: readonly Job[]): Pack {
  const job = jobs.find((candidate) => candidate.packs.some((each) => each.id === pack.id));
  const { id, code, cutId, cut, carcaseId, earTag, grams, packedOn, useBy, place } = pack;
  const inOrder = { orderNo: job?.orderNo ?? null, orderName: job?.orderName ?? null };
  return { id, code, cutId, cut, carcaseId, earTag: formatEarTag(earTag), grams, packedOn, useBy, place, ...inOrder };
}

type ListFacts = { figures: DayCutouts; published: AllocationRow | null; packs: PackingWork['packs'] };

/** What the plan foresees of each cut of a carcase, less what leaves whole, beside what lies packed. */
function listCuts(carcase: CarcaseFigures, { figures, published, packs }: ListFacts): PackingDay['cuttingList'] {
  const whole = soldWhole(published);
  const foreseen = new Map<string, { grams: number; ways: Set<string> }>();
  for (const node of carcase.cutout.nodes) {
    const [side = '', , primalId = ''] = node.path.split('/');
    if (node.cutId === null || whole.has(`${carcase.row.id}/${side}/${primalId}`)) continue;
    const entry = foreseen.get(node.cutId) ?? { grams: 0, ways: new Set<string>() };
    entry.grams += node.grams;
    entry.ways.add(wayName(carcase.row.id, { side, primalId }, { figures, published }));
    foreseen.set(node.cutId, entry);
  }
  const minced = figures.specification.cuts.find((cut) => cut.kind === 'mince');
  // What was weighed twice never was a pack.
  const packedHere = packs.filter((pack) => pack.carcaseId === carcase.row.id && pack.place !== 'carcase');
  if (minced && !foreseen.has(minced.id)) foreseen.set(minced.id, { grams: 0, ways: new Set(['from trim']) });
  return [...foreseen].flatMap(([cutId, { grams, ways }]) => {
    const cut = figures.specification.cuts.find((candidate) => candidate.id === cutId);
    if (!cut) return [];
    return [
      {
        carcaseId: carcase.row.id,
        cutId,
        cut: cut.name,
        way: [...ways].filter(Boolean).join(', '),
        foreseenGrams: grams,
        packedGrams: packedHere.filter((pack) => pack.cutId === cutId).reduce((sum, pack) => sum + pack.grams, 0),
        minPackGrams: cut.minPackGrams,
        maxPackGrams: cut.maxPackGrams,
      },
    ];
  });
}

function soldWhole(published: AllocationRow | null): Set<string> {
  const fates = published?.plan.plan.fates ?? [];
  return new Set(fates.flatMap((fate) => fate.soldPrimals.map((sold) => `${fate.sideId}/${sold.primalId}`)));
}

type WayFacts = { figures: DayCutouts; published: AllocationRow | null };

function wayName(carcaseId: string, at: { side: string; primalId: string }, facts: WayFacts): string {
  const choice = facts.figures.specification.choices.find((candidate) => candidate.primalIds.includes(at.primalId));
  const fate = facts.published?.plan.plan.fates.find(
    (each) => each.carcaseId === carcaseId && each.side === at.side && each.choiceId === choice?.id,
  );
  return choice?.ways.find((way) => way.id === fate?.wayId)?.name ?? '';
}

export function noSuchPack(): AppError {
  return new AppError('NOT_FOUND', 'There is no such pack.');
}
