import type { Answer, Input } from '#shared/contracts/endpoint.ts';
import type { checkPromoSchema } from '#shared/contracts/promo-schema.ts';
import type { NewPromoCode, PromoCode } from '#shared/contracts/promo.ts';
import { discountOf } from '#shared/domain/promo.ts';
import { formatDay, formatMoney } from '#shared/domain/words.ts';
import { AppError } from '#shared/errors.ts';
import type { Db, Deps, Tx } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import type { Caller } from '#server/http/route.ts';
import { getProducts } from '#server/orders/basket.ts';
import * as queries from './promo-queries.ts';

type Taker = { email: string; userId: string | null; goodsPence: number };

/** What a code would take off, said before the order is placed: a word about it stands beside the field. */
export async function checkPromo(
  deps: Deps,
  { code, dayId, lines, email }: Input<typeof checkPromoSchema>['body'],
  caller: Caller | null,
): Promise<Answer<typeof checkPromoSchema>> {
  const products = await getProducts(deps.db, dayId, lines);
  const goodsPence = lines.reduce(
    (sum, { offerId, quantity }) => sum + quantity * (products.get(offerId)?.unitPricePence ?? 0),
    0,
  );
  const promo = await queries.findPromo(deps.db, code);
  const taker = { email: (email ?? caller?.email ?? '').toLowerCase(), userId: caller?.id ?? null, goodsPence };
  await refuseUnlessGood(deps.db, promo, { ...taker, today: deps.clock.today() });
  return { code, discountPence: promo ? discountOf(promo, goodsPence) : 0 };
}

/** Takes the code for an order, under its lock: a code with one use left goes to one of two buyers. */
export async function takePromo(
  tx: Tx,
  deps: Deps,
  { code, orderId, ...person }: Taker & { code: string; orderId: string },
): Promise<number> {
  const promo = await queries.lockPromo(tx, code);
  const taker = { ...person, email: person.email.toLowerCase() };
  await refuseUnlessGood(tx, promo, { ...taker, today: deps.clock.today() });
  if (!promo) return 0;
  const { email, userId, goodsPence } = taker;
  await queries.insertUse(tx, { orderId, promoId: promo.id, email, userId, isOnce: promo.isOncePerCustomer });
  return discountOf(promo, goodsPence);
}

async function refuseUnlessGood(
  db: Db | Tx,
  promo: queries.PromoRow | null,
  taker: Taker & { today: string },
): Promise<void> {
  const words = await refusalOf(db, promo, taker);
  if (!words) return;
  throw new AppError('INVALID_INPUT', `${words} Nothing was charged; your basket is as you left it.`, {
    fields: { promoCode: words },
  });
}

async function refusalOf(
  db: Db | Tx,
  promo: queries.PromoRow | null,
  taker: Taker & { today: string },
): Promise<string | null> {
  if (!promo) return 'There is no such code.';
  if (promo.closedAt) return 'This code is closed.';
  if (promo.lastDay && taker.today > promo.lastDay) return `This code counted until ${formatDay(promo.lastDay)}.`;
  if (taker.goodsPence < promo.minimumPence) {
    return `This code counts from ${formatMoney(promo.minimumPence)} on; ${formatMoney(promo.minimumPence - taker.goodsPence)} is missing.`;
  }
  if (promo.isOncePerCustomer && (await queries.hasUsed(db, promo.id, taker))) return 'You have used this code before.';
  if (promo.usageLimit !== null && (await queries.countUses(db, promo.id)) >= promo.usageLimit) {
    return 'This code has been used as often as it can be.';
  }
  return null;
}

export async function listPromoCodes(deps: Deps): Promise<{ codes: PromoCode[] }> {
  return { codes: (await queries.listPromos(deps.db)).map(describe) };
}

function describe({ promo, uses }: Awaited<ReturnType<typeof queries.listPromos>>[number]): PromoCode {
  const { id, code, percent, amountPence, minimumPence, lastDay, usageLimit, isOncePerCustomer } = promo;
  return {
    ...{ id, code, percent, amountPence, minimumPence, lastDay, usageLimit, isOncePerCustomer, uses },
    closedAt: promo.closedAt?.toISOString() ?? null,
  };
}

export async function makePromoCode(deps: Deps, byUserId: string, wanted: NewPromoCode): Promise<PromoCode> {
  if ((wanted.percent === null) === (wanted.amountPence === null)) {
    const words = 'Give either per cent or an amount.';
    throw new AppError('INVALID_INPUT', `${words} Nothing was saved.`, { fields: { percent: words } });
  }
  return deps.db.transaction(async (tx) => {
    const promoId = await queries.insertPromo(tx, wanted);
    if (!promoId) {
      const words = `There is a code ${wanted.code} already, perhaps a closed one.`;
      throw new AppError('ALREADY_KNOWN', `${words} Nothing was saved.`, { fields: { code: words } });
    }
    await recordAudit(tx, { byUserId, action: 'made', subject: 'promo code', subjectId: promoId, detail: wanted });
    return getPromo(tx, promoId);
  });
}

/** Orders that have the code keep it. Closed twice is closed once. */
export async function closePromoCode(deps: Deps, byUserId: string, promoId: string): Promise<PromoCode> {
  return deps.db.transaction(async (tx) => {
    if (await queries.closePromo(tx, promoId, deps.clock.now())) {
      await recordAudit(tx, { byUserId, action: 'closed', subject: 'promo code', subjectId: promoId });
    }
    return getPromo(tx, promoId);
  });
}

async function getPromo(tx: Tx, promoId: string): Promise<PromoCode> {
  const [row] = await queries.listPromos(tx, promoId);
  if (!row) throw new AppError('NOT_FOUND', 'There is no such code.');
  return describe(row);
}
