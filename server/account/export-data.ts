import { consentWords } from '#shared/domain/consent.ts';
import type { Deps } from '#server/deps.ts';
import { listConsents } from './consent-queries.ts';
import { findProfile } from './account-queries.ts';
import { listMailsTo, listPlacesOf, listStandingOf, readOrders, readPerson } from './export-queries.ts';

/** Everything that is kept about a person, in words of its own: no number of ours that means nothing to them. */
export async function exportData(deps: Deps, person: { id: string; email: string }): Promise<string> {
  const { db } = deps;
  const [account, profile, orders, consents, waitingList, standingOrders, mails] = await Promise.all([
    readPerson(db, person.id),
    findProfile(db, person.id),
    readOrders(db, person),
    listConsents(db, person.email.toLowerCase()),
    listPlacesOf(db, person.email),
    listStandingOf(db, person.id),
    listMailsTo(db, person.email),
  ]);
  const data = {
    writtenAt: deps.clock.now(),
    account: { ...account, phone: profile?.phone ?? '' },
    marketingConsent: consents.map(({ wordingVersion, ...entry }) => ({
      ...entry,
      words: consentWords(wordingVersion),
    })),
    orders: describeOrders(orders),
    waitingList,
    standingOrders,
    mails,
  };
  return JSON.stringify(data, null, 2);
}

type Orders = Awaited<ReturnType<typeof readOrders>>;

function describeOrders({ orders, lines, payments }: Orders) {
  return orders.map(({ order, day, stars, words }) => ({
    orderNo: order.orderNo,
    orderedAt: order.createdAt,
    cuttingDay: day,
    state: order.state,
    paymentState: order.paymentState,
    name: order.name,
    email: order.email,
    phone: order.phone,
    note: order.note,
    deliveryAddress: order.deliveryAddress,
    deliveryPostcode: order.deliveryPostcode,
    totalPence: order.totalPence,
    lines: lines
      .filter((line) => line.orderId === order.id)
      .map(({ name, quantity, unitPricePence }) => ({ name, quantity, unitPricePence })),
    payments: payments
      .filter((row) => row.orderId === order.id)
      .map(({ kind, reason, amountPence, state, createdAt }) => ({ kind, reason, amountPence, state, at: createdAt })),
    feedback: stars === null ? null : { stars, words },
  }));
}
