import { queryOptions, useQuery } from '@tanstack/react-query';
import {
  confirmCollectionMails,
  getRunSheet,
  listCollectionMails,
  listMails,
  markOrder,
  resendMail,
} from '#shared/contracts/collections.ts';
import type { CallInput } from '#shared/contracts/endpoint.ts';
import type { confirmCollectionMailsSchema, markOrderSchema } from '#shared/contracts/packs-schema.ts';
import { call } from './api.ts';
import { STALE } from './query-client.ts';
import { useFarmMutation } from './use-farm-mutation.ts';

/** While a mail is on its way, how often to ask what became of it, in milliseconds. */
const ASK_AGAIN_MS = 3_000;

export function collectionMailsQuery(dayId: string) {
  return queryOptions({
    queryKey: ['collection-mails', dayId],
    queryFn: ({ signal }) => call(listCollectionMails, { params: { dayId }, signal }),
    staleTime: STALE.stock,
    refetchInterval: (query) =>
      query.state.data?.mails.some(({ mail }) => mail?.state === 'queued') ? ASK_AGAIN_MS : false,
  });
}

export function mailsQuery() {
  return queryOptions({
    queryKey: ['mails'],
    queryFn: ({ signal }) => call(listMails, { signal }),
    staleTime: STALE.stock,
    refetchInterval: (query) =>
      query.state.data?.mails.some((mail) => mail.state === 'queued') ? ASK_AGAIN_MS : false,
  });
}

export function runSheetQuery(dayId: string) {
  return queryOptions({
    queryKey: ['run-sheets', dayId],
    queryFn: ({ signal }) => call(getRunSheet, { params: { dayId }, signal }),
    staleTime: STALE.stock,
  });
}

export function useCollectionMails(dayId: string) {
  return useQuery(collectionMailsQuery(dayId));
}

export function useMails() {
  return useQuery(mailsQuery());
}

export function useRunSheet(dayId: string) {
  return useQuery(runSheetQuery(dayId));
}

export function useConfirmCollectionMails() {
  return useFarmMutation((input: CallInput<typeof confirmCollectionMailsSchema>) =>
    call(confirmCollectionMails, input),
  );
}

export function useResendMail() {
  return useFarmMutation((mailId: string) => call(resendMail, { params: { mailId } }));
}

export function useMarkOrder() {
  return useFarmMutation((input: CallInput<typeof markOrderSchema>) => call(markOrder, input));
}
