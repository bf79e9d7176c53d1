import type { Day } from '#shared/domain/day.ts';
import { formatMoney, formatRate, formatWeight } from '#shared/domain/words.ts';
import { letterHtml, letterText, type LetterPart } from './letter-html.ts';
import type { OrderFacts, WrittenMail } from './order-facts.ts';

/** Plain data of a butcher's reservation, as every mail about it is written from. */
export type ReservationFacts = {
  farm: OrderFacts['farm'];
  reservationNo: number;
  businessName: string;
  day: Day;
  url: string;
  cuttingNote: string;
  /** What the farm or the plan answered, in plain words. */
  answer: string;
  lines: {
    name: string;
    earTag: string | null;
    side: string | null;
    grams: number;
    tenthPencePerKg: number;
    linePence: number;
  }[];
  totalPence: number;
};

export function writeTradeMail(facts: ReservationFacts, subject: string, parts: LetterPart[]): WrittenMail {
  const { name, businessName, email, phone } = facts.farm;
  const all: LetterPart[] = [
    ...parts,
    { kind: 'button', text: 'See your reservations', url: facts.url },
    { kind: 'text', text: `Anything wrong? Write to ${email} or ring ${phone}.\n${businessName}` },
  ];
  return { subject: `${subject} · ${name}`, text: letterText(name, all), html: letterHtml(name, all) };
}

/** Each line with the beast that gives it, its weight and its price at the butcher's own rate. */
export function reservedRows(facts: ReservationFacts): LetterPart {
  const rows = facts.lines.map((line): [string, string] => {
    const from = line.earTag ? ` of ${line.earTag}${line.side ? `, ${line.side} side` : ''}` : '';
    const price = `${formatWeight(line.grams)} at ${formatRate(line.tenthPencePerKg)}: ${formatMoney(line.linePence)}`;
    return [`${line.name}${from}`, price];
  });
  const note: [string, string][] = facts.cuttingNote ? [['Your cutting note', facts.cuttingNote]] : [];
  return { kind: 'rows', rows: [...rows, ['Together, about', formatMoney(facts.totalPence)], ...note] };
}
