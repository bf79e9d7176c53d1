import { z } from 'zod';
import { ORDER_STATES, PAYMENT_STATES } from '#shared/domain/order-state.ts';
import { Count, Day, DeliveryAddress, Email, Id, Instant, Line, Note, Phone, PromoText } from './fields-schema.ts';

export const BasketLine = z.strictObject({ offerId: Id, quantity: Count });
export type BasketLine = z.infer<typeof BasketLine>;

export const BasketLines = z
  .array(BasketLine)
  .min(1, 'The basket is empty.')
  .max(40, 'At most forty lines in one order.');

export const PricedLine = z.strictObject({
  offerId: Id,
  kind: z.enum(['box', 'loose']),
  name: z.string(),
  quantity: z.int(),
  /** How many could be bought now. */
  free: z.int(),
  unitPricePence: z.int(),
  linePence: z.int(),
  /** Guaranteed weight of a box, upper weight of a loose pack. */
  unitGrams: z.int(),
});
export type PricedLine = z.infer<typeof PricedLine>;

/** From the mail of the waiting list: one box of the basket is kept for its holder. */
const WaitingToken = z.string().regex(/^[A-Za-z0-9_-]{20,64}$/);

export const priceBasketSchema = {
  body: z.strictObject({ dayId: Id, lines: BasketLines, waitingToken: WaitingToken.optional() }),
  answer: z.strictObject({
    dayId: Id,
    day: Day,
    cutOffAt: Instant,
    isInTime: z.boolean(),
    lines: z.array(PricedLine),
    totalPence: z.int(),
  }),
};

export const Checkout = z.strictObject({
  /** Made by the browser once per basket, so that a second press finds the first order. */
  basketKey: Id,
  dayId: Id,
  lines: BasketLines,
  /** A collection time, unless the van brings it. */
  slotId: Id.optional(),
  delivery: DeliveryAddress.optional(),
  promoCode: PromoText.optional(),
  /** All of it now, or a deposit and the rest once it is packed. */
  pay: z.enum(['in full', 'deposit']).optional(),
  name: Line,
  email: Email,
  phone: Phone,
  note: Note,
  /** Ticked: marketing mail may be sent to this address. Asked for apart from the order and never ticked beforehand. */
  wantsNews: z.boolean().optional(),
  waitingToken: WaitingToken.optional(),
});
export type Checkout = z.infer<typeof Checkout>;

export const placeOrderSchema = {
  body: Checkout,
  answer: z.strictObject({
    orderNo: z.int(),
    token: z.string(),
    state: z.enum(ORDER_STATES),
    paymentUrl: z.string().nullable(),
  }),
};

export const Order = z.strictObject({
  orderNo: z.int(),
  token: z.string(),
  state: z.enum(ORDER_STATES),
  paymentState: z.enum(PAYMENT_STATES),
  /** Where to go on paying while the payment page is still open. */
  paymentUrl: z.string().nullable(),
  paymentExpiresAt: Instant.nullable(),
  name: z.string(),
  email: z.string(),
  note: z.string(),
  day: Day,
  cutOffAt: Instant,
  /** Paid, and its cut-off is still to come: time, swaps, additions, cancelling. */
  canChange: z.boolean(),
  dayId: Id,
  slotId: Id,
  /** Raised by each change. */
  version: z.int(),
  lines: z.array(
    z.strictObject({
      id: Id,
      offerId: Id,
      name: z.string(),
      kind: z.enum(['box', 'loose']),
      quantity: z.int(),
      unitPricePence: z.int(),
      linePence: z.int(),
      unitGrams: z.int(),
      /** Other variants of the same box that are free now, at the same price. */
      swaps: z.array(z.strictObject({ offerId: Id, name: z.string(), summary: z.string(), free: z.int() })),
    }),
  ),
  /** The promotional code that the order has. */
  promoCode: z.string().nullable(),
  discountPence: z.int(),
  deliveryPence: z.int(),
  totalPence: z.int(),
  refundedPence: z.int(),
  /** Of a deposit order: what was paid at once, and how its rest stands. */
  deposit: z
    .strictObject({ depositPence: z.int(), rest: z.enum(['later', 'asked', 'failed', 'paid']), restPence: z.int() })
    .nullable(),
  /** More for this order, held while it is being paid. */
  addition: z
    .strictObject({ amountPence: z.int(), paymentUrl: z.string(), expiresAt: Instant, words: z.string() })
    .nullable(),
  /** The van brings it: the place is the buyer's own address. */
  isDelivered: z.boolean(),
  collection: z.strictObject({
    name: z.string(),
    addressLines: z.array(z.string()),
    directions: z.string(),
    bring: z.string(),
    startsAt: Instant,
    endsAt: Instant,
  }),
  packs: z.array(z.strictObject({ code: z.string(), cut: z.string(), grams: z.int(), box: z.string() })),
});
export type Order = z.infer<typeof Order>;

/** The private link of an order. */
export const OrderToken = z.strictObject({ token: z.string().regex(/^[A-Za-z0-9_-]{20,64}$/) });
export const getOrderSchema = { params: OrderToken, answer: Order };
export const leavePaymentSchema = { params: OrderToken, answer: Order };
export const cancelOrderSchema = { params: OrderToken, answer: Order };

export const OrderSummary = z.strictObject({
  id: Id,
  orderNo: z.int(),
  token: z.string(),
  name: z.string(),
  day: Day,
  state: z.enum(ORDER_STATES),
  paymentState: z.enum(PAYMENT_STATES),
  totalPence: z.int(),
  lines: z.array(z.string()),
  startsAt: Instant,
  pointName: z.string(),
});
export type OrderSummary = z.infer<typeof OrderSummary>;

export const listMyOrdersSchema = { answer: z.strictObject({ orders: z.array(OrderSummary) }) };
export const listOrdersSchema = {
  query: z.strictObject({ dayId: Id.optional(), state: z.enum(ORDER_STATES).optional() }),
  answer: z.strictObject({ orders: z.array(OrderSummary) }),
};
/** A refund that the payment company or the bank refused. */
export const FailedRefund = z.strictObject({
  paymentId: Id,
  orderNo: z.int(),
  name: z.string(),
  amountPence: z.int(),
  reason: z.string(),
  error: z.string().nullable(),
});
export type FailedRefund = z.infer<typeof FailedRefund>;
export const listFailedRefundsSchema = { answer: z.strictObject({ refunds: z.array(FailedRefund) }) };
export const retryRefundSchema = {
  params: z.strictObject({ paymentId: Id }),
  answer: z.strictObject({ refunds: z.array(FailedRefund) }),
};
export const cancelOrderByOwnerSchema = {
  params: z.strictObject({ orderId: Id }),
  body: z.strictObject({ reason: Line }),
  answer: OrderSummary,
};
