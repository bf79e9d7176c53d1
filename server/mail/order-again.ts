import type { Day } from '#shared/domain/day.ts';
import { formatDay, formatDayTime } from '#shared/domain/words.ts';
import { writeMail, type OrderFacts, type WrittenMail } from './order-facts.ts';

export type Invitation = {
  /** The next cutting day that has something left. */
  next: { day: Day; cutOffAt: Date };
  unsubscribeUrl: string;
};

/** Marketing: only for those who asked for it, and always with the way out. */
export function orderAgainMail(facts: OrderFacts, { next, unsubscribeUrl }: Invitation): WrittenMail {
  const items = facts.lines.map((line) => `${line.quantity} × ${line.name}`).join('\n');
  return writeMail(facts, `Beef for the freezer again? The next is cut ${formatDay(next.day)}`, [
    { kind: 'heading', text: 'Room in the freezer again?' },
    {
      kind: 'text',
      text: `${facts.name}, it is a while since order ${facts.orderNo}. We cut again ${formatDay(next.day)}, and you can order until ${formatDayTime(next.cutOffAt)}.`,
    },
    { kind: 'rows', rows: [['You had', items]] },
    { kind: 'button', text: 'Order the same again', url: facts.url },
    { kind: 'text', text: 'You get this mail because you asked us to write when it may be time to order again.' },
    { kind: 'link', text: 'No more mails like this', url: unsubscribeUrl },
  ]);
}
