import type { Day } from '#shared/domain/day.ts';
import { formatDay, formatDayTime } from '#shared/domain/words.ts';
import { letterHtml, letterText, type LetterPart } from '#server/mail/letter-html.ts';
import type { OrderFacts, WrittenMail } from '#server/mail/order-facts.ts';

export type WaitingFacts = { farm: OrderFacts['farm']; box: string; url: string };

function write(facts: WaitingFacts, subject: string, parts: LetterPart[]): WrittenMail {
  const { name, businessName, email, phone } = facts.farm;
  const all: LetterPart[] = [...parts, { kind: 'text', text: `Anything wrong? Write to ${email} or ring ${phone}.` }];
  return { subject: `${subject} · ${name}`, text: letterText(businessName, all), html: letterHtml(name, all) };
}

/** Nobody is put on the list by somebody else: the address has to say yes itself. */
export function confirmPlaceMail(facts: WaitingFacts & { day: Day | null }): WrittenMail {
  const forDay = facts.day ? ` for ${formatDay(facts.day)}` : '';
  return write(facts, `Waiting for ${facts.box}${forDay}: please confirm`, [
    { kind: 'heading', text: 'Shall we write when there is one?' },
    {
      kind: 'text',
      text: `Somebody, most likely you, asked to be told when ${facts.box}${forDay} comes free again. Press the button to go on the list. Nothing is ordered and nothing is owed.`,
    },
    { kind: 'button', text: 'Go on the list', url: facts.url },
    { kind: 'text', text: 'If it was not you, do nothing: without this step we do not write again.' },
  ]);
}

export function boxKeptMail(facts: WaitingFacts & { day: Day; until: Date }): WrittenMail {
  const until = formatDayTime(facts.until);
  return write(facts, `One ${facts.box} box is kept for you until ${until}`, [
    { kind: 'heading', text: 'There is one again' },
    {
      kind: 'text',
      text: `One ${facts.box} box of ${formatDay(facts.day)} came free, and you are next. We keep it for you until ${until}; after that it goes to the next on the list.`,
    },
    { kind: 'button', text: 'Take the box', url: facts.url },
    { kind: 'text', text: 'You do not want it any more? The same page gives it up, and somebody else is glad of it.' },
  ]);
}
