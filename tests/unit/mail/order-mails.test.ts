import { describe, expect, test } from 'vitest';
import { nothingLeftMail } from '#server/mail/nothing-left.ts';
import { orderCancelledMail } from '#server/mail/order-cancelled.ts';
import { orderConfirmedMail } from '#server/mail/order-confirmed.ts';
import type { OrderFacts } from '#server/mail/order-facts.ts';
import { cutOffTomorrowMail } from '#server/mail/cut-off-tomorrow.ts';
import { missedCollectionMail } from '#server/mail/missed-collection.ts';
import { readyToCollectMail } from '#server/mail/ready-to-collect.ts';
import { refundSentMail } from '#server/mail/refund-sent.ts';

const facts: OrderFacts = {
  farm: { name: 'Skelderwick', businessName: 'Skelderwick Farm', email: 'farm@example.com', phone: '01632 960100' },
  orderId: '0b1c',
  orderNo: 1042,
  name: 'Ada <b>Fell</b> & Sons',
  url: 'https://shop.example.com/orders/a-long-private-token',
  day: '2026-12-11',
  cutOffAt: new Date('2026-12-09T18:00:00Z'),
  lines: [
    { name: 'Hearth', kind: 'box', quantity: 1, unitPricePence: 9_400, linePence: 9_400, unitGrams: 5_000 },
    { name: 'Rump steak', kind: 'loose', quantity: 2, unitPricePence: 1_300, linePence: 2_600, unitGrams: 650 },
  ],
  discountPence: 0,
  deliveryPence: 0,
  isDelivered: false,
  totalPence: 12_000,
  collection: {
    name: 'The farm gate',
    addressLines: ['Skelderwick Farm', 'ZZ1 1AA'],
    directions: 'Up the lane past the chapel.',
    bring: 'A cool bag.',
    startsAt: new Date('2026-12-12T10:00:00Z'),
    endsAt: new Date('2026-12-12T10:30:00Z'),
  },
};

const mails = [
  ['confirmed', orderConfirmedMail(facts)],
  ['cancelled by the customer', orderCancelledMail(facts, { reason: null, refundPence: 12_000 })],
  ['cancelled by the farm', orderCancelledMail(facts, { reason: 'The cold room <failed>.', refundPence: 0 })],
  ['paid too late', nothingLeftMail(facts, 12_000)],
  ['refunded', refundSentMail(facts, { amountPence: 250, reason: 'Weights' })],
  ['ready', readyToCollectMail(facts)],
  ['about to close', cutOffTomorrowMail(facts)],
  ['missed', missedCollectionMail(facts)],
] as const;

describe.each(mails)('the mail of an order that is %s', (_name, mail) => {
  test('names the order in a subject of one line, and the farm', () => {
    expect(mail.subject).toContain('1042');
    expect(mail.subject).toMatch(/ · Skelderwick$/);
    expect(mail.subject).not.toMatch(/[\r\n]/);
  });

  test('carries the private link and how to reach the farm, in both forms', () => {
    for (const words of [facts.url, 'farm@example.com', '01632 960100']) {
      expect(mail.text).toContain(words);
      expect(mail.html).toContain(words);
    }
  });

  test('shows what people typed as they typed it, and never as markup', () => {
    expect(mail.html).toContain('Ada &lt;b&gt;Fell&lt;/b&gt; &amp; Sons');
    expect(mail.html).not.toMatch(/<b>|<failed>/);
    expect(mail.text).toContain('Ada <b>Fell</b> & Sons');
  });

  test('fits a telephone and loads nothing from elsewhere', () => {
    expect(mail.html).toContain('width=device-width');
    expect(mail.html).toContain('lang="en-GB"');
    expect(mail.html).not.toMatch(/<img|src=|<script|<link/);
  });
});

test('the mail of a ready order says when, where, what to bring and how to keep raw meat', () => {
  const { text, subject } = readyToCollectMail(facts);
  expect(subject).toContain('Sat 12 Dec, 10:00 to 10:30');
  for (const words of ['The farm gate', 'ZZ1 1AA', 'Up the lane', 'A cool bag.', '5 °C', 'use-by', '2 × Rump steak']) {
    expect(text).toContain(words);
  }
});

test('the mail of a confirmed order explains the upper weight only where there is a loose pack', () => {
  expect(orderConfirmedMail(facts).text).toContain('upper weight');
  const boxOnly = { ...facts, lines: facts.lines.slice(0, 1) };
  expect(orderConfirmedMail(boxOnly).text).not.toContain('upper weight');
  expect(orderConfirmedMail(facts).text).toContain('until Wed 9 Dec, 18:00');
});
