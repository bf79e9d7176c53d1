import type { Lock, PlannedChoice, PlannedSide } from '#shared/contracts/allocation.ts';

type Place = Pick<Lock, 'carcaseId' | 'side' | 'choiceId'>;

function isSamePlace(a: Place, b: Place): boolean {
  return a.carcaseId === b.carcaseId && a.side === b.side && a.choiceId === b.choiceId;
}

export function findLock(locks: readonly Lock[], place: Place): Lock | undefined {
  return locks.find((lock) => isSamePlace(lock, place));
}

/** Sets, changes or, with no way given, takes off the hand on one choice; the others stay. */
export function setLock(locks: readonly Lock[], place: Place, wayId: string | undefined): Lock[] {
  const others = locks.filter((lock) => !isSamePlace(lock, place));
  const { carcaseId, side, choiceId } = place;
  return wayId === undefined ? others : [...others, { carcaseId, side, choiceId, wayId }];
}

/** Whether two sets of locks say the same, in whatever order. */
export function areSameLocks(a: readonly Lock[], b: readonly Lock[]): boolean {
  return a.length === b.length && a.every((lock) => findLock(b, lock)?.wayId === lock.wayId);
}

/** The choices that decide about a primal, or about the members of a merged one. */
export function choicesOf(side: PlannedSide, primalIds: readonly string[]): PlannedChoice[] {
  return side.choices.filter((choice) => choice.primalIds.some((id) => primalIds.includes(id)));
}

export type Members = Readonly<Record<string, readonly string[]>>;

/** Which primals hang together on a narrow rail, as the day's specification has it. */
export function narrowMembers(specification: Record<string, unknown> | undefined): Members {
  const groups = specification?.narrowPrimals;
  if (!Array.isArray(groups)) return {};
  return Object.fromEntries(
    (groups as { id: string; primalIds: string[] }[]).map(({ id, primalIds }) => [id, primalIds]),
  );
}
