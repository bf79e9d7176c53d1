import { EngineError } from '#shared/engine/engine-error.ts';
import type { AllocationInput, WayLock } from './allocation-input.ts';
import { checkRecipe } from './check-recipe.ts';

function refuseLock(lock: WayLock, sentence: string): never {
  throw new EngineError('LOCK_CONFLICT', `${sentence} Nothing was planned; take the lock off and try again.`, {
    node: `${lock.carcaseId}/${lock.side}/${lock.choiceId}`,
    figures: { wayId: lock.wayId },
  });
}

function checkLocks(input: AllocationInput): void {
  const locked = new Map<string, WayLock>();
  for (const lock of input.locks) {
    const side = input.sides.find((each) => each.carcaseId === lock.carcaseId && each.side === lock.side);
    const choice = side?.choices.find(({ choiceId }) => choiceId === lock.choiceId);
    if (!choice) refuseLock(lock, `A lock names ${lock.choiceId} of a side that is not in this plan.`);
    const way = choice.ways.find(({ wayId }) => wayId === lock.wayId);
    if (!way) refuseLock(lock, `A lock names a way of ${choice.name} that the specification does not have.`);
    if (way.closedReason)
      refuseLock(lock, `${choice.name} is locked to ${way.name}, which is closed: ${way.closedReason}`);
    const key = `${lock.carcaseId}/${lock.side}/${lock.choiceId}`;
    const other = locked.get(key);
    if (other && other.wayId !== lock.wayId)
      refuseLock(lock, `${choice.name} of one side is locked to two ways at once.`);
    locked.set(key, lock);
  }
}

/** A choice with no open way could not be cut at all; the specification must offer one. */
function checkWays(input: AllocationInput): void {
  for (const side of input.sides) {
    const shut = side.choices.find(({ ways }) => ways.every(({ closedReason }) => closedReason !== null));
    if (!shut) continue;
    throw new EngineError(
      'LOCK_CONFLICT',
      `Every way of ${shut.name} is closed: ${shut.ways[0]?.closedReason ?? 'it has none'}. Nothing was planned; add an open way to the specification.`,
      { node: `${side.id}/${shut.choiceId}` },
    );
  }
}

function checkNumbers(input: AllocationInput): void {
  const figures = [
    ...input.sides.flatMap(({ choices }) =>
      choices.flatMap(({ ways }) => ways.flatMap(({ yields }) => yields.map((each) => each.grams))),
    ),
    ...input.stock.map(({ grams }) => grams),
    ...input.boxes.flatMap(({ floor, steps }) => [floor, ...steps.map(({ boxes }) => boxes)]),
    ...input.loose.flatMap(({ floor, steps }) => [floor, ...steps.map(({ packs }) => packs)]),
    ...input.trade.map((line) => (line.kind === 'cut' ? line.grams : line.quantity)),
  ];
  const wrong = figures.find((figure) => !Number.isSafeInteger(figure) || figure < 0);
  if (wrong !== undefined) throw new RangeError(`${wrong} is no count and no weight in grams`);
}

/** Refuses what no plan could answer: conflicting locks, choices without an open way, recipes that no box can meet. */
export function checkInput(input: AllocationInput): void {
  checkNumbers(input);
  const cuts = new Map(input.cuts.map((cut) => [cut.id, cut]));
  for (const box of input.boxes) checkRecipe(box.name, box, cuts);
  checkWays(input);
  checkLocks(input);
}
