import { queryOptions, useQuery } from '@tanstack/react-query';
import type { CallInput } from '#shared/contracts/endpoint.ts';
import type { editDeliveryAreaSchema } from '#shared/contracts/delivery-schema.ts';
import {
  addDeliveryArea,
  editDeliveryArea,
  listDeliveryAreas,
  type DeliveryAreaEdit,
} from '#shared/contracts/delivery.ts';
import { listFailedRefunds, retryRefund } from '#shared/contracts/orders.ts';
import { closePromoCode, listPromoCodes, makePromoCode, type NewPromoCode } from '#shared/contracts/promo.ts';
import { call } from './api.ts';
import { STALE } from './query-client.ts';
import { useFarmMutation } from './use-farm-mutation.ts';

export function promoCodesQuery() {
  return queryOptions({
    queryKey: ['promo-codes'],
    queryFn: ({ signal }) => call(listPromoCodes, { signal }),
    staleTime: STALE.office,
  });
}

export function deliveryAreasQuery() {
  return queryOptions({
    queryKey: ['delivery-areas'],
    queryFn: ({ signal }) => call(listDeliveryAreas, { signal }),
    staleTime: STALE.office,
  });
}

export function failedRefundsQuery() {
  return queryOptions({
    queryKey: ['failed-refunds'],
    queryFn: ({ signal }) => call(listFailedRefunds, { signal }),
    staleTime: STALE.stock,
  });
}

export function usePromoCodes() {
  return useQuery(promoCodesQuery());
}

export function useMakePromoCode() {
  return useFarmMutation((body: NewPromoCode) => call(makePromoCode, { body }));
}

export function useClosePromoCode() {
  return useFarmMutation((promoId: string) => call(closePromoCode, { params: { promoId } }));
}

export function useDeliveryAreas() {
  return useQuery(deliveryAreasQuery());
}

export function useAddDeliveryArea() {
  return useFarmMutation((body: DeliveryAreaEdit) => call(addDeliveryArea, { body }));
}

export function useEditDeliveryArea() {
  return useFarmMutation((input: CallInput<typeof editDeliveryAreaSchema>) => call(editDeliveryArea, input));
}

export function useFailedRefunds() {
  return useQuery(failedRefundsQuery());
}

export function useRetryRefund() {
  return useFarmMutation((paymentId: string) => call(retryRefund, { params: { paymentId } }));
}
