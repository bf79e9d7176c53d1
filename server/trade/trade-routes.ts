import {
  applyForTrade,
  cancelReservation,
  confirmReservation,
  decideTradeAccount,
  dispatchReservation,
  getTradeAccount,
  listMyReservations,
  listReservations,
  listTradeAccounts,
  listTradeDays,
  refuseReservation,
  reserve,
  setTradePrices,
} from '#shared/contracts/trade.ts';
import * as schema from '#shared/contracts/trade-schema.ts';
import { AppError } from '#shared/errors.ts';
import type { Deps } from '#server/deps.ts';
import { route, signedIn, type Api, type Caller } from '#server/http/route.ts';
import * as accounts from './account-service.ts';
import { dispatchReservation as dispatch } from './dispatch-service.ts';
import * as reservations from './reservation-service.ts';
import { listTradeDays as listDays } from './trade-day-service.ts';
import { findAccountOf, type AccountRow } from './trade-queries.ts';

export function addTradeRoutes(api: Api, deps: Deps): void {
  addAccountRoutes(api, deps);
  addButcherRoutes(api, deps);
  addOwnerRoutes(api, deps);
}

function addAccountRoutes(api: Api, deps: Deps): void {
  route(api, getTradeAccount, {
    schema: schema.getTradeAccountSchema,
    handle: async (_input, caller) => ({ account: await accounts.getAccountOf(deps, signedIn(caller)) }),
  });
  route(api, applyForTrade, {
    schema: schema.applyForTradeSchema,
    handle: ({ body }, caller) => accounts.applyForTrade(deps, signedIn(caller), body),
  });
}

function addButcherRoutes(api: Api, deps: Deps): void {
  route(api, listTradeDays, {
    schema: schema.listTradeDaysSchema,
    handle: async (_input, caller) => ({ days: await listDays(deps, await getApproved(deps, caller)) }),
  });
  route(api, reserve, {
    schema: schema.reserveSchema,
    handle: async ({ body }, caller) => reservations.reserve(deps, await getApproved(deps, caller), body),
  });
  route(api, listMyReservations, {
    schema: schema.listMyReservationsSchema,
    handle: async (_input, caller) => {
      const account = await getApproved(deps, caller);
      return { reservations: await reservations.listReservations(deps, account.id) };
    },
  });
  route(api, cancelReservation, {
    schema: schema.cancelReservationSchema,
    handle: async ({ params, body }, caller) =>
      reservations.cancelReservation(deps, await getApproved(deps, caller), { ...params, ...body }),
  });
}

function addOwnerRoutes(api: Api, deps: Deps): void {
  route(api, listReservations, {
    schema: schema.listReservationsSchema,
    handle: async () => ({ reservations: await reservations.listReservations(deps, null) }),
  });
  route(api, confirmReservation, {
    schema: schema.confirmReservationSchema,
    handle: ({ params, body }, caller) =>
      reservations.confirmReservation(deps, signedIn(caller).id, { ...params, ...body }),
  });
  route(api, refuseReservation, {
    schema: schema.refuseReservationSchema,
    handle: ({ params, body }, caller) =>
      reservations.refuseReservation(deps, signedIn(caller).id, { ...params, ...body }),
  });
  route(api, dispatchReservation, {
    schema: schema.dispatchReservationSchema,
    handle: ({ params, body }, caller) => dispatch(deps, signedIn(caller).id, { ...params, ...body }),
  });
  route(api, listTradeAccounts, {
    schema: schema.listTradeAccountsSchema,
    handle: async () => ({ accounts: await accounts.listTradeAccounts(deps) }),
  });
  route(api, decideTradeAccount, {
    schema: schema.decideTradeAccountSchema,
    handle: ({ params, body }, caller) => accounts.decideAccount(deps, signedIn(caller).id, { ...params, ...body }),
  });
  route(api, setTradePrices, {
    schema: schema.setTradePricesSchema,
    handle: ({ params, body }, caller) => accounts.setPrices(deps, signedIn(caller).id, { ...params, ...body }),
  });
}

/** A butcher's own business; the role alone is not enough. */
async function getApproved(deps: Deps, caller: Caller | null): Promise<AccountRow> {
  const account = await findAccountOf(deps.db, signedIn(caller).id);
  if (account?.state !== 'approved') throw new AppError('FORBIDDEN', 'Your trade account is not approved yet.');
  return account;
}
