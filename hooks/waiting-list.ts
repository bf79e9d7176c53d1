import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import {
  confirmWaitingPlace,
  getWaitingPlace,
  joinWaitingList,
  leaveWaitingPlace,
  type JoinWaitingList,
  type WaitingPlace,
} from '#shared/contracts/waiting-list.ts';
import { call } from './api.ts';
import { useLoaded, type Loaded } from './loaded.ts';
import { STALE } from './query-client.ts';

export function useJoinWaitingList() {
  return useMutation({ mutationFn: (body: JoinWaitingList) => call(joinWaitingList, { body }) });
}

function placeQuery(token: string) {
  return queryOptions({
    queryKey: ['waiting-place', token],
    queryFn: ({ signal }) => call(getWaitingPlace, { params: { token }, signal }),
    staleTime: STALE.stock,
  });
}

export function useWaitingPlace(token: string, loaded: Loaded<WaitingPlace>) {
  return useLoaded(placeQuery(token), loaded);
}

/** Saying yes to a place, or giving it up. */
export function useChangePlace(token: string, change: 'confirm' | 'leave') {
  const client = useQueryClient();
  const endpoint = change === 'confirm' ? confirmWaitingPlace : leaveWaitingPlace;
  return useMutation({
    mutationFn: () => call(endpoint, { params: { token } }),
    onSuccess: (place) => client.setQueryData(placeQuery(token).queryKey, place),
  });
}
