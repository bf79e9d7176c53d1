import type { Answer } from '#shared/contracts/endpoint.ts';
import type { Feedback, FeedbackEdit } from '#shared/contracts/feedback.ts';
import type { listFeedbackSchema } from '#shared/contracts/feedback-schema.ts';
import type { OrderState } from '#shared/domain/order-state.ts';
import { AppError } from '#shared/errors.ts';
import type { Deps } from '#server/deps.ts';
import { getOrderByToken } from '#server/orders/read-order.ts';
import { findFeedback, listNewestFeedback, saveFeedback, sumFeedbackByBox } from './feedback-queries.ts';

const MOST_SHOWN = 200;

const isHandedOver = (state: OrderState) => state === 'collected' || state === 'delivered';

export async function readFeedback(deps: Deps, token: string): Promise<Feedback> {
  const order = await getOrderByToken(deps.db, token);
  const given = await findFeedback(deps.db, order.id);
  return {
    canGive: isHandedOver(order.state),
    given: given && { stars: given.stars, words: given.words, changedAt: given.changedAt.toISOString() },
  };
}

/** By the private link of the order, once it has been handed over; as often as the customer likes, the last word counts. */
export async function giveFeedback(deps: Deps, token: string, { stars, words }: FeedbackEdit): Promise<Feedback> {
  const order = await getOrderByToken(deps.db, token);
  if (!isHandedOver(order.state)) {
    throw new AppError('STATE_CHANGED', 'You can tell us what you think once you have the order. Nothing was kept.');
  }
  await saveFeedback(deps.db, { orderId: order.id, stars, words, changedAt: deps.clock.now() });
  return readFeedback(deps, token);
}

export async function listFeedback(deps: Deps): Promise<Answer<typeof listFeedbackSchema>> {
  const [boxes, rows] = await Promise.all([sumFeedbackByBox(deps.db), listNewestFeedback(deps.db, MOST_SHOWN)]);
  return { boxes, feedback: rows.map((row) => ({ ...row, changedAt: row.changedAt.toISOString() })) };
}
