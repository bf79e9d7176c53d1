import { repairFill } from '#shared/engine/box-fill/repair-fill.ts';
import { recordMovements, type Place } from '#server/carcases/ledger-queries.ts';
import type { Tx } from '#server/deps.ts';
import { freePacks, SEED, storeOf } from './fill-service.ts';
import { describeFill, placedPacks, type Job } from './fill-work.ts';
import { endAssignments, insertAssignments } from './pack-queries.ts';
import type { PackingWork } from './packing-day.ts';

type BoxJob = Extract<Job, { kind: 'box' }>;

/**
 * Boxes that a lost or re-weighed pack has broken take from the packs that lie beside; only when these do not do is
 * another box opened to change a pack with it. Boxes that were handed over, and those that went short, stay shut.
 */
export async function mendBoxes(tx: Tx, byUserId: string, work: PackingWork): Promise<void> {
  const boxes = work.jobs.filter(
    (job): job is BoxJob =>
      job.kind === 'box' && !job.isDone && job.packs.length > 0 && (!job.isPacked || describeFill(job).isFilled),
  );
  if (!boxes.some((job) => !describeFill(job).isFilled)) return;
  const before = boxes.map((job) => ({ boxId: job.id, packs: placedPacks(job) }));
  const repair = repairFill({
    before,
    boxes: boxes.map(({ id, recipe }) => ({ id, recipe, earlierGiveAwayGrams: 0 })),
    packs: [...freePacks(work.packs), ...before.flatMap((box) => box.packs)],
    seed: SEED,
  });
  const touched = boxes.flatMap((job) => {
    const box = repair.boxes.find((each) => each.boxId === job.id);
    return box && repair.touchedBoxIds.includes(job.id) ? [{ job, packs: box.packs }] : [];
  });
  const had = new Set(touched.flatMap(({ job }) => job.packs.map((pack) => pack.id)));
  const has = new Set(touched.flatMap(({ packs }) => packs.map((pack) => pack.id)));
  await endAssignments(tx, [...had]);
  await insertAssignments(
    tx,
    touched.flatMap(({ job, packs }) =>
      packs.map(({ id, lineId }) => ({ packId: id, orderLineId: job.lineId, copy: job.copy, boxLine: lineId })),
    ),
  );
  await movePacks(tx, byUserId, {
    work,
    out: [...had].filter((id) => !has.has(id)),
    in: [...has].filter((id) => !had.has(id)),
  });
}

type Moves = { work: PackingWork; out: string[]; in: string[] };

/** A pack that changes from one box to another stays among the orders. */
async function movePacks(tx: Tx, byUserId: string, { work, ...moves }: Moves): Promise<void> {
  const move = (ids: string[], placesOf: (store: Place) => { fromPlace: Place; toPlace: Place }) =>
    ids.flatMap((packId) => {
      const pack = work.packs.find((each) => each.id === packId);
      if (!pack) return [];
      const { carcaseId, grams } = pack;
      return [{ ...placesOf(storeOf(pack)), packId, carcaseId, grams, reason: 'box mended', byUserId }];
    });
  await recordMovements(tx, [
    ...move(moves.out, (store) => ({ fromPlace: 'order', toPlace: store })),
    ...move(moves.in, (store) => ({ fromPlace: store, toPlace: 'order' })),
  ]);
}
