import { queryOptions, useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import {
  getTurn,
  listMyStanding,
  payTurn,
  setStandingState,
  skipTurn,
  startStanding,
  type StandingTurn,
  type StartStanding,
} from '#shared/contracts/standing-orders.ts';
import { call } from './api.ts';
import { useLoaded, type Loaded } from './loaded.ts';
import { STALE } from './query-client.ts';

function myStandingQuery() {
  return queryOptions({
    queryKey: ['my-standing'],
    queryFn: ({ signal }) => call(listMyStanding, { signal }),
    staleTime: STALE.stock,
  });
}

/** The standing orders of whoever is signed in, and the terms of a new one. */
export function useMyStanding(isSignedIn: boolean) {
  return useQuery({ ...myStandingQuery(), enabled: isSignedIn });
}

/** Goes to payment for the first box. */
export function useStartStanding() {
  return useMutation({ mutationFn: (body: StartStanding) => call(startStanding, { body }) });
}

export function useSetStandingState() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ standingId, state }: { standingId: string; state: 'active' | 'paused' | 'ended' }) =>
      call(setStandingState, { params: { standingId }, body: { state } }),
    onSuccess: (mine) => client.setQueryData(myStandingQuery().queryKey, mine),
  });
}

function turnQuery(token: string) {
  return queryOptions({
    queryKey: ['standing-turn', token],
    queryFn: ({ signal }) => call(getTurn, { params: { token }, signal }),
    staleTime: STALE.stock,
  });
}

export function useTurn(token: string, loaded: Loaded<StandingTurn>) {
  return useLoaded(turnQuery(token), loaded);
}

export function useSkipTurn(token: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: () => call(skipTurn, { params: { token } }),
    onSuccess: (turn) => {
      client.setQueryData(turnQuery(token).queryKey, turn);
      return client.invalidateQueries({ queryKey: myStandingQuery().queryKey });
    },
  });
}

export function usePayTurn(token: string) {
  return useMutation({
    mutationFn: () => call(payTurn, { params: { token } }),
    onSuccess: ({ paymentUrl }) => {
      if (paymentUrl) window.location.assign(paymentUrl);
    },
  });
}
