import {
  keepPreviousData,
  queryOptions,
  useMutation,
  useQuery,
  useQueryClient,
  type QueryClient,
} from '@tanstack/react-query';
import {
  getOrder,
  listMyOrders,
  placeOrder,
  priceBasket,
  type BasketLine,
  type Checkout,
  type Order,
} from '#shared/contracts/orders.ts';
import { AppError, type FieldErrors } from '#shared/errors.ts';
import { call } from './api.ts';
import { useLoaded, type Loaded } from './loaded.ts';
import { STALE } from './query-client.ts';
import { keptBox } from './use-basket.ts';

/** While the payment company's word is on its way: often at first, then with patience. */
const POLL_SOON_MS = 1_500;
const POLL_LATER_MS = 10_000;
const SOON_POLLS = 40;

/** The payment company has the next word: on a payment, on more that is added, or on a refund after cancelling. */
function isMoving({ state, paymentUrl, paymentState, addition }: Order): boolean {
  if (addition) return true;
  if (state === 'awaiting payment') return paymentUrl !== null;
  return state === 'cancelled' && (paymentState === 'paid' || paymentState === 'part paid');
}

export function orderQuery(token: string) {
  return queryOptions({
    queryKey: ['orders', token],
    queryFn: ({ signal }) => call(getOrder, { params: { token }, signal }),
    staleTime: STALE.stock,
    refetchInterval: ({ state }) => {
      if (!state.data || !isMoving(state.data)) return false;
      return state.dataUpdateCount < SOON_POLLS ? POLL_SOON_MS : POLL_LATER_MS;
    },
  });
}

export function useOrder(token: string, loaded: Loaded<Order>) {
  return useLoaded(orderQuery(token), loaded);
}

/** The order that a basket went to payment with, from wherever the shop's reader is now. */
export function useOpenOrder(token: string) {
  return useQuery(orderQuery(token));
}

export function basketPriceQuery(dayId: string, lines: BasketLine[], kept: { waitingToken?: string }) {
  return queryOptions({
    queryKey: ['basket', dayId, lines, kept],
    queryFn: ({ signal }) => call(priceBasket, { body: { dayId, lines, ...kept }, signal }),
    staleTime: STALE.stock,
    placeholderData: keepPreviousData,
  });
}

/** Prices, stock and the sum as the farm counts them; the former figures stay while a change is worked out. */
export function useBasketPrice(dayId: string | undefined, lines: BasketLine[]) {
  const query = basketPriceQuery(dayId ?? '', lines, keptBox());
  return useQuery({ ...query, enabled: dayId !== undefined && lines.length > 0 });
}

/** Goes to payment. Whatever the answer, stock and slots have moved: both are asked for again. */
export function usePlaceOrder() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: Checkout) => call(placeOrder, { body: { ...body, ...keptBox() } }),
    onSettled: () => forgetStock(client),
  });
}

/** Stock and slots have moved. */
export function forgetStock(client: QueryClient) {
  const kinds = [['basket'], ['collections'], ['shop'], ['cuts'], ['boxes']];
  return Promise.all(kinds.map((queryKey) => client.invalidateQueries({ queryKey })));
}

export function useMyOrders(isSignedIn: boolean) {
  return useQuery({
    queryKey: ['my-orders'],
    queryFn: ({ signal }) => call(listMyOrders, { signal }),
    staleTime: STALE.office,
    enabled: isSignedIn,
  });
}

/** A refused order as the form shows it: one sentence, and the sentences that stand beside fields. */
export function refusalOf(error: Error | null): { message: string; fields: FieldErrors } | undefined {
  if (!error) return undefined;
  if (!(error instanceof AppError)) return { message: error.message, fields: {} };
  const slot = error.code === 'SLOT_FULL' ? { slotId: error.message } : {};
  return { message: error.message, fields: { ...slot, ...error.fields } };
}
