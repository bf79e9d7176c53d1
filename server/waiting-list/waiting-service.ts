import { randomBytes } from 'node:crypto';
import type { JoinWaitingList, WaitingPlace } from '#shared/contracts/waiting-list.ts';
import { AppError } from '#shared/errors.ts';
import type { Deps, Tx } from '#server/deps.ts';
import { getFarm } from '#server/farm/farm-queries.ts';
import { queueMail } from '#server/mail/outbox.ts';
import { findDay, freeHeld } from '#server/orders/stock-queries.ts';
import { confirmPlaceMail } from './waiting-mails.ts';
import * as queries from './waiting-queries.ts';

/** More than this many live places of one address are no person's wish. */
const MOST_PLACES = 10;

export function placeUrl(deps: Deps, token: string): string {
  return `${deps.origin}/waiting-list/${token}`;
}

/**
 * Asks the address by mail whether it wants to wait. The answer is the same whether it waits already or not, so that
 * nobody learns who is on the list.
 */
export async function joinWaitingList(deps: Deps, wish: JoinWaitingList): Promise<{ sentTo: string }> {
  const box = await queries.findBox(deps.db, wish.slug);
  if (!box) throw new AppError('NOT_FOUND', 'There is no such box. All boxes are on the first page of the shop.');
  const dayId = wish.dayId ?? null;
  const offers = await queries.listOffersOfBox(deps.db, { boxKindId: box.id, dayId, now: deps.clock.now() });
  if (dayId && offers.length === 0) {
    throw new AppError('INVALID_INPUT', 'This day is not on sale any more. You can wait for any day instead.', {
      fields: { dayId: 'This day is not on sale any more.' },
    });
  }
  if (offers.some((offer) => offer.free > 0)) {
    throw new AppError('STATE_CHANGED', `${box.name} can be had just now: you can put it into your basket.`);
  }
  const email = wish.email.toLowerCase();
  await deps.db.transaction(async (tx) => {
    if ((await queries.countLivePlaces(tx, email)) >= MOST_PLACES) return;
    const token = randomBytes(24).toString('base64url');
    const place = await queries.insertPlace(tx, {
      ...{ boxKindId: box.id, cuttingDayId: dayId, email, token },
      createdAt: deps.clock.now(),
    });
    if (!place) return;
    const day = dayId ? ((await findDay(tx, dayId))?.day ?? null) : null;
    await queueMail(tx, {
      eventKey: `waiting list asked ${place.id}`,
      kind: 'waiting list, confirm',
      to: wish.email,
      ...confirmPlaceMail({ farm: await getFarm(tx), box: box.name, url: placeUrl(deps, token), day }),
    });
  });
  return { sentTo: wish.email };
}

export async function readPlace(deps: Deps, token: string): Promise<WaitingPlace> {
  const row = await queries.readPlace(deps.db, token);
  if (!row) throw noSuchPlace();
  const { place, slug, box, day, kept, ahead } = row;
  const { state, heldUntil } = place;
  return {
    ...{ state, slug, box, day, ahead },
    kept: heldUntil && kept ? { ...kept, until: heldUntil.toISOString() } : null,
  };
}

/** The address says yes. Pressed again, it changes nothing. */
export async function confirmPlace(deps: Deps, token: string): Promise<WaitingPlace> {
  await deps.db.transaction(async (tx) => {
    const place = await queries.lockPlace(tx, { token });
    if (!place) throw noSuchPlace();
    if (place.state === 'unconfirmed') await queries.updatePlace(tx, place.id, { state: 'waiting' });
  });
  return readPlace(deps, token);
}

/** Gives the place up, and with it the box that is kept for it. One that is over stays as it ended. */
export async function leavePlace(deps: Deps, token: string): Promise<WaitingPlace> {
  await deps.db.transaction(async (tx) => {
    const place = await queries.lockPlace(tx, { token });
    if (!place) throw noSuchPlace();
    if (['unconfirmed', 'waiting', 'offered'].includes(place.state)) await giveUp(tx, place, 'left');
  });
  return readPlace(deps, token);
}

/** Gives up every place of an address. */
export async function leaveAll(tx: Tx, email: string): Promise<void> {
  for (const place of await queries.lockLivePlaces(tx, email.toLowerCase())) await giveUp(tx, place, 'left');
}

/** Ends a place; the box that was held for it is free again. */
export async function giveUp(tx: Tx, place: queries.WaitingRow, state: 'left' | 'lapsed'): Promise<void> {
  if (place.state === 'offered' && place.offerId) await freeHeld(tx, { offerId: place.offerId, quantity: 1 });
  await queries.updatePlace(tx, place.id, { state, heldUntil: null });
}

function noSuchPlace(): AppError {
  return new AppError('NOT_FOUND', 'This link is not known here. Please open it from the mail once more.');
}
