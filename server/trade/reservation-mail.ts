import type { Deps, Tx } from '#server/deps.ts';
import { getFarm } from '#server/farm/farm-queries.ts';
import { queueMail } from '#server/mail/outbox.ts';
import { reservationConfirmedMail } from '#server/mail/reservation-confirmed.ts';
import { reservationRefusedMail } from '#server/mail/reservation-refused.ts';
import { describeReservations } from './describe-reservation.ts';
import { findAccount, findReservation } from './trade-queries.ts';

/** Tells the butcher what became of a reservation, in the transaction that decides it. One mail an answer. */
export async function queueAnswer(deps: Deps, tx: Tx, reservationId: string): Promise<void> {
  const row = await findReservation(tx, reservationId);
  const account = row && (await findAccount(tx, row.accountId));
  const [described] = row ? await describeReservations(tx, [row]) : [];
  if (!account || !described || (described.state !== 'confirmed' && described.state !== 'refused')) return;
  const { name, businessName, email, phone } = await getFarm(tx);
  const facts = { ...described, farm: { name, businessName, email, phone }, url: `${deps.origin}/trade` };
  await queueMail(tx, {
    eventKey: `reservation ${described.state} ${reservationId}`,
    kind: `reservation ${described.state}`,
    to: account.email,
    ...(described.state === 'confirmed' ? reservationConfirmedMail(facts) : reservationRefusedMail(facts)),
  });
}
