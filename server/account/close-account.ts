import { createHash, randomBytes } from 'node:crypto';
import { AppError } from '#shared/errors.ts';
import type { Db, Deps, Tx } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { getFarm } from '#server/farm/farm-queries.ts';
import { letterHtml, letterText, type LetterPart } from '#server/mail/letter-html.ts';
import { queueMail } from '#server/mail/outbox.ts';
import { leaveAll } from '#server/waiting-list/waiting-service.ts';
import {
  forgetOrders,
  forgetPerson,
  hasTradeAccount,
  keepClosingLink,
  listOrdersOf,
  lockClosing,
} from './account-queries.ts';

const LINK_HOURS = 1;

const hashOf = (token: string) => createHash('sha256').update(token).digest('hex');

type Person = { id: string; email: string };

/** Mails the link that closes the account. Refused while the farm still owes something to the person, or they to it. */
export async function askClosing(deps: Deps, person: Person): Promise<{ sentTo: string }> {
  const token = randomBytes(24).toString('base64url');
  await deps.db.transaction(async (tx) => {
    await refuseWhileOpen(tx, person);
    const expiresAt = new Date(deps.clock.now().getTime() + LINK_HOURS * 3_600_000);
    await keepClosingLink(tx, { userId: person.id, tokenHash: hashOf(token), expiresAt });
    const { name } = await getFarm(tx);
    const parts: LetterPart[] = [
      { kind: 'heading', text: 'Close your account?' },
      {
        kind: 'text',
        text: 'Somebody, most likely you, asked to close the account of this address. The button closes it: your details, your consents and your sessions are removed. Of past orders we keep what was sold, as the books need it, without your name.',
      },
      { kind: 'button', text: 'Go on to close the account', url: `${deps.origin}/account/close?token=${token}` },
      { kind: 'text', text: 'The link works for one hour. If it was not you, do nothing: the account stays as it is.' },
    ];
    await queueMail(tx, {
      eventKey: `close account ${hashOf(token)}`,
      kind: 'close account',
      to: person.email,
      subject: `Close your account? · ${name}`,
      text: letterText(name, parts),
      html: letterHtml(name, parts),
    });
  });
  return { sentTo: person.email };
}

/** By the mailed link alone. One transaction: either all of the person is gone, or nothing was changed. */
export async function closeAccount(deps: Deps, token: string): Promise<{ isClosed: true }> {
  await deps.db.transaction(async (tx) => {
    const person = await lockClosing(tx, hashOf(token), deps.clock.now());
    if (!person) {
      throw new AppError('NOT_FOUND', 'This link was used before or is older than an hour. Nothing was changed.');
    }
    await refuseWhileOpen(tx, person);
    await leaveAll(tx, person.email);
    const orders = await listOrdersOf(tx, { userId: person.id, email: person.email });
    await forgetOrders(
      tx,
      orders.map((order) => order.id),
    );
    await forgetPerson(tx, person);
    await recordAudit(tx, { byUserId: null, action: 'closed', subject: 'account', subjectId: person.id });
  });
  return { isClosed: true };
}

const COMING = ['confirmed', 'packed', 'ready'];

async function refuseWhileOpen(db: Db | Tx, person: Person): Promise<void> {
  const kept = 'Nothing was changed.';
  if (await hasTradeAccount(db, person.id)) {
    throw new AppError('STATE_CHANGED', `A trade account belongs to this one: please ring the farm. ${kept}`);
  }
  for (const order of await listOrdersOf(db, { userId: person.id, email: person.email })) {
    if (COMING.includes(order.state) || order.isHeld) {
      throw new AppError(
        'STATE_CHANGED',
        `Order ${order.orderNo} is still to come. Collect, cancel or skip it first, then close the account. ${kept}`,
      );
    }
    if (order.isMoneyMoving) {
      throw new AppError(
        'STATE_CHANGED',
        `Money of order ${order.orderNo} is still on its way to you. Close the account once it is there. ${kept}`,
      );
    }
  }
}
