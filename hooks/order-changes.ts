import { useMutation, useQueryClient } from '@tanstack/react-query';
import { addToOrder, changeSlot, leaveAddition, swapBox } from '#shared/contracts/order-changes.ts';
import { cancelOrder, leavePayment, type BasketLine, type Order } from '#shared/contracts/orders.ts';
import { call } from './api.ts';
import { forgetStock, orderQuery } from './orders.ts';

/** A change of a paid order. Its answer is the order as it is now; a refusal is news, so the order is asked for again. */
export function useOrderChange<Input = void>(token: string, change: (input: Input) => Promise<Order>) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: change,
    onSuccess: (order) => {
      client.setQueryData(orderQuery(token).queryKey, order);
      return forgetStock(client);
    },
    onError: async () => {
      await client.invalidateQueries({ queryKey: ['orders', token] });
      await forgetStock(client);
    },
  });
}

export function useChangeSlot(token: string) {
  return useOrderChange(token, (slotId: string) => call(changeSlot, { params: { token }, body: { slotId } }));
}

export function useSwapBox(token: string) {
  return useOrderChange(token, (body: { lineId: string; offerId: string; quantity: number }) =>
    call(swapBox, { params: { token }, body }),
  );
}

/** Goes to payment for more, on a page of the payment company. */
export function useAddToOrder(token: string) {
  return useOrderChange(token, (body: { version: number; lines: BasketLine[] }) =>
    call(addToOrder, { params: { token }, body }),
  );
}

export function useLeaveAddition(token: string) {
  return useOrderChange(token, () => call(leaveAddition, { params: { token } }));
}

export function useCancelOrder(token: string) {
  return useOrderChange(token, () => call(cancelOrder, { params: { token } }));
}

export function useLeavePayment(token: string) {
  return useOrderChange(token, () => call(leavePayment, { params: { token } }));
}
