import { formatDay } from '#shared/domain/words.ts';
import type { WrittenMail } from './order-facts.ts';
import { reservedRows, writeTradeMail, type ReservationFacts } from './reservation-facts.ts';

/** The beef is the butcher's: what it weighs on the day is what it costs. */
export function reservationConfirmedMail(facts: ReservationFacts): WrittenMail {
  const day = formatDay(facts.day);
  return writeTradeMail(facts, `Reservation ${facts.reservationNo} is confirmed for ${day}`, [
    { kind: 'heading', text: `Yours for ${day}` },
    {
      kind: 'text',
      text: `${facts.businessName}, reservation ${facts.reservationNo} is confirmed. Nothing of it can be sold to anyone else.`,
    },
    reservedRows(facts),
    {
      kind: 'text',
      text: 'Weights are estimates until the beef is on the scale. You pay for what it weighs, at the rates above.',
    },
  ]);
}
