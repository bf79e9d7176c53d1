import { queryOptions, useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import {
  askClosing,
  closeAccount,
  editMyDetails,
  getMyDetails,
  getSubscription,
  setMyNews,
  unsubscribe,
  type MyDetails,
  type MyDetailsEdit,
  type Subscription,
} from '#shared/contracts/account.ts';
import { call } from './api.ts';
import { useLoaded, type Loaded } from './loaded.ts';
import { meQuery } from './me.ts';
import { STALE } from './query-client.ts';

function myDetailsQuery() {
  return queryOptions({
    queryKey: ['my-details'],
    queryFn: ({ signal }) => call(getMyDetails, { signal }),
    staleTime: STALE.office,
  });
}

/** Name, address, telephone and consent of whoever is signed in; the checkout fills itself in from it. */
export function useMyDetails(isSignedIn: boolean) {
  return useQuery({ ...myDetailsQuery(), enabled: isSignedIn });
}

function useDetailsChange<Input>(send: (input: Input) => Promise<MyDetails>) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: send,
    onSuccess: async (details) => {
      client.setQueryData(myDetailsQuery().queryKey, details);
      await client.invalidateQueries({ queryKey: meQuery().queryKey });
    },
  });
}

export function useEditMyDetails() {
  return useDetailsChange((body: MyDetailsEdit) => call(editMyDetails, { body }));
}

export function useSetMyNews() {
  return useDetailsChange((isGiven: boolean) => call(setMyNews, { body: { isGiven } }));
}

export function useAskClosing() {
  return useMutation({ mutationFn: () => call(askClosing, {}) });
}

/** By the mailed link. Nothing of the account stays in the window. */
export function useCloseAccount(token: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: () => call(closeAccount, { body: { token } }),
    onSuccess: () => client.clear(),
  });
}

function subscriptionQuery(token: string) {
  return queryOptions({
    queryKey: ['subscription', token],
    queryFn: ({ signal }) => call(getSubscription, { params: { token }, signal }),
    staleTime: STALE.office,
  });
}

export function useSubscription(token: string, loaded: Loaded<Subscription>) {
  return useLoaded(subscriptionQuery(token), loaded);
}

export function useUnsubscribe(token: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: () => call(unsubscribe, { params: { token } }),
    onSuccess: (subscription) => client.setQueryData(subscriptionQuery(token).queryKey, subscription),
  });
}
