import * as changes from '#shared/contracts/order-changes.ts';
import * as schema from '#shared/contracts/order-changes-schema.ts';
import type { Deps } from '#server/deps.ts';
import { route, type Api } from '#server/http/route.ts';
import { openBalancePage, readBalance, startBalance } from '#server/payments/balance-page.ts';
import { addToOrder } from './add-to-order.ts';
import { closeAddition } from './addition-page.ts';
import { changeSlot } from './change-slot.ts';
import { getOrderByToken } from './read-order.ts';
import { swapBox } from './swap-box.ts';
import { readOrder } from './view-order.ts';

export function addOrderChangeRoutes(api: Api, deps: Deps): void {
  route(api, changes.changeSlot, {
    schema: schema.changeSlotSchema,
    handle: ({ params, body }) => changeSlot(deps, { ...params, ...body }),
  });
  route(api, changes.swapBox, {
    schema: schema.swapBoxSchema,
    handle: ({ params, body }) => swapBox(deps, { ...params, ...body }),
  });
  route(api, changes.addToOrder, {
    schema: schema.addToOrderSchema,
    handle: ({ params, body }) => addToOrder(deps, { ...params, ...body }),
  });
  route(api, changes.getBalance, {
    schema: schema.getBalanceSchema,
    handle: ({ params }) => readBalance(deps, params.token),
  });
  route(api, changes.startBalance, {
    schema: schema.startBalanceSchema,
    handle: ({ params }) => startBalance(deps, params.token),
  });
  route(api, changes.openBalancePage, {
    schema: schema.openBalancePageSchema,
    handle: ({ params }) => openBalancePage(deps, params.token),
  });
  route(api, changes.leaveAddition, {
    schema: schema.leaveAdditionSchema,
    handle: async ({ params }) => {
      await closeAddition(deps, (await getOrderByToken(deps.db, params.token)).id);
      return readOrder(deps, params.token);
    },
  });
}
