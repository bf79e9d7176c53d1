import type { StandingTurn } from '#shared/contracts/standing-orders.ts';
import { formatDay, formatDayTime, formatMoney } from '#shared/domain/words.ts';

/** How one box of a standing order stands, for its page. */
export function turnWords({ state, box, quantity, day, totalPence, chargeAt, cutOffAt }: StandingTurn) {
  const what = `${quantity} × ${box} of ${formatDay(day)}`;
  const amount = formatMoney(totalPence);
  switch (state) {
    case 'planned':
      return {
        title: `${what} is kept for you`,
        lead: `${amount} is charged to your card ${formatDayTime(chargeAt)}.`,
      };
    case 'failed':
      return {
        title: 'Your card was refused',
        lead: `${what} is kept until ${formatDayTime(cutOffAt)}. Pay ${amount} by hand until then, or skip it.`,
      };
    case 'skipped':
      return {
        title: 'This box is skipped',
        lead: 'Nothing is charged for it. The standing order goes on with the next.',
      };
    case 'paid':
      return { title: `${what} is paid`, lead: 'Its own page says when and where to collect it.' };
  }
}
