import { getOrderCalendar } from '#shared/contracts/downloads.ts';
import { getOrderCalendarSchema } from '#shared/contracts/downloads-schema.ts';
import * as orders from '#shared/contracts/orders.ts';
import * as schema from '#shared/contracts/orders-schema.ts';
import type { Deps } from '#server/deps.ts';
import { download, route, signedIn, type Api } from '#server/http/route.ts';
import { readFailedRefunds, retryRefund } from '#server/payments/retry-refund.ts';
import { priceOf } from './basket.ts';
import { cancelOrder, cancelOrderByOwner } from './cancel-order.ts';
import { closePage, placeOrder } from './place-order.ts';
import { getOrderByToken, orderCalendar, readOrderFacts, readSummaries } from './read-order.ts';
import { readOrder } from './view-order.ts';

export function addOrderRoutes(api: Api, deps: Deps): void {
  route(api, orders.priceBasket, { schema: schema.priceBasketSchema, handle: ({ body }) => priceOf(deps, body) });
  route(api, orders.placeOrder, {
    schema: schema.placeOrderSchema,
    handle: ({ body }, caller) => placeOrder(deps, { basket: body, caller }),
  });
  route(api, orders.getOrder, { schema: schema.getOrderSchema, handle: ({ params }) => readOrder(deps, params.token) });
  download(api, getOrderCalendar, {
    schema: getOrderCalendarSchema,
    handle: async ({ params }) => {
      const order = await getOrderByToken(deps.db, params.token);
      const facts = await readOrderFacts(deps, deps.db, order);
      return {
        contentType: 'text/calendar; charset=utf-8',
        filename: `collect-order-${order.orderNo}.ics`,
        body: orderCalendar(facts, order, deps.clock.now()),
      };
    },
  });
  route(api, orders.leavePayment, {
    schema: schema.leavePaymentSchema,
    handle: async ({ params }) => {
      await closePage(deps, await getOrderByToken(deps.db, params.token));
      return readOrder(deps, params.token);
    },
  });
  route(api, orders.cancelOrder, {
    schema: schema.cancelOrderSchema,
    handle: ({ params }) => cancelOrder(deps, params.token),
  });
  route(api, orders.listMyOrders, {
    schema: schema.listMyOrdersSchema,
    handle: async (_input, caller) => ({ orders: await readSummaries(deps.db, { userId: signedIn(caller).id }) }),
  });
  route(api, orders.listOrders, {
    schema: schema.listOrdersSchema,
    handle: async ({ query }) => ({ orders: await readSummaries(deps.db, query) }),
  });
  route(api, orders.listFailedRefunds, {
    schema: schema.listFailedRefundsSchema,
    handle: () => readFailedRefunds(deps),
  });
  route(api, orders.retryRefund, {
    schema: schema.retryRefundSchema,
    handle: ({ params }, caller) => retryRefund(deps, signedIn(caller).id, params.paymentId),
  });
  route(api, orders.cancelOrderByOwner, {
    schema: schema.cancelOrderByOwnerSchema,
    handle: ({ params, body }, caller) =>
      cancelOrderByOwner(deps, { orderId: params.orderId, reason: body.reason, byUserId: signedIn(caller).id }),
  });
}
