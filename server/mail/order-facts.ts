import type { Day } from '#shared/domain/day.ts';
import { formatDayTime, formatMoney, formatTime, formatWeight } from '#shared/domain/words.ts';
import { letterHtml, letterText, type LetterPart } from './letter-html.ts';

/** Plain data of an order, as every mail about it is written from. */
export type OrderFacts = {
  farm: { name: string; businessName: string; email: string; phone: string };
  orderId: string;
  orderNo: number;
  name: string;
  url: string;
  day: Day;
  cutOffAt: Date;
  lines: {
    name: string;
    kind: 'box' | 'loose';
    quantity: number;
    unitPricePence: number;
    linePence: number;
    unitGrams: number;
  }[];
  discountPence: number;
  deliveryPence: number;
  totalPence: number;
  /** The van brings it: the place is the buyer's own address. */
  isDelivered: boolean;
  collection: {
    name: string;
    addressLines: string[];
    directions: string;
    bring: string;
    startsAt: Date;
    endsAt: Date;
  };
};

export type WrittenMail = { subject: string; text: string; html: string };

export function writeMail(facts: OrderFacts, subject: string, parts: LetterPart[]): WrittenMail {
  const { name, businessName, email, phone } = facts.farm;
  const all: LetterPart[] = [...parts, { kind: 'text', text: `Anything wrong? Write to ${email} or ring ${phone}.` }];
  return { subject: `${subject} · ${name}`, text: letterText(businessName, all), html: letterHtml(name, all) };
}

/** `Fri 12 Dec, 10:00 to 10:30`. */
export function collectionTime({ startsAt, endsAt }: OrderFacts['collection']): string {
  return `${formatDayTime(startsAt)} to ${formatTime(endsAt)}`;
}

export function lineRows(facts: OrderFacts): LetterPart {
  const rows = facts.lines.map((line): [string, string] => [
    `${line.quantity} × ${line.name}, ${line.kind === 'box' ? 'at least' : 'up to'} ${formatWeight(line.unitGrams)}`,
    formatMoney(line.linePence),
  ]);
  if (facts.discountPence > 0) rows.push(['Taken off', formatMoney(-facts.discountPence)]);
  if (facts.isDelivered) rows.push(['Delivery', formatMoney(facts.deliveryPence)]);
  return { kind: 'sums', rows: [...rows, ['Total', formatMoney(facts.totalPence)]] };
}

export function placeRows({ collection, isDelivered }: OrderFacts): LetterPart {
  return {
    kind: 'rows',
    rows: [
      ['When', collectionTime(collection)],
      ['Where', [collection.name, ...collection.addressLines].join('\n')],
      [isDelivered ? 'At the door' : 'Finding it', collection.directions],
      [isDelivered ? 'Please have' : 'Please bring', collection.bring],
    ],
  };
}
