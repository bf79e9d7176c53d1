import { addDays } from '#shared/domain/day.ts';
import type { Tx } from '#server/deps.ts';
import { findTurn, lockStanding, setTurnState, updateStanding } from './standing-queries.ts';

/** The turn is over; the next box is due so many weeks after its day. */
export async function finish(tx: Tx, { turnId, state }: { turnId: string; state: 'paid' | 'skipped' }): Promise<void> {
  await setTurnState(tx, turnId, state);
  const facts = await findTurn(tx, { id: turnId });
  const standing = facts && (await lockStanding(tx, facts.standing.id));
  if (!standing) return;
  await updateStanding(tx, standing.id, { nextFrom: addDays(facts.day, 7 * standing.everyWeeks) });
}
