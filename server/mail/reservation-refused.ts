import { formatDay } from '#shared/domain/words.ts';
import type { WrittenMail } from './order-facts.ts';
import { reservedRows, writeTradeMail, type ReservationFacts } from './reservation-facts.ts';

/** What was asked for cannot be met; the answer says what still can. */
export function reservationRefusedMail(facts: ReservationFacts): WrittenMail {
  const day = formatDay(facts.day);
  return writeTradeMail(facts, `Reservation ${facts.reservationNo} for ${day} could not be met`, [
    { kind: 'heading', text: 'Sorry, not this time' },
    {
      kind: 'text',
      text: `${facts.businessName}, we cannot meet reservation ${facts.reservationNo} for ${day}. Nothing is reserved and nothing is owed.`,
    },
    { kind: 'text', text: facts.answer },
    reservedRows(facts),
  ]);
}
