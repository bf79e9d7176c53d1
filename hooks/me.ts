import { queryOptions, useQuery } from '@tanstack/react-query';
import { getMe } from '#shared/contracts/office.ts';
import { call } from './api.ts';
import { STALE } from './query-client.ts';

export function meQuery() {
  return queryOptions({ queryKey: ['me'], queryFn: ({ signal }) => call(getMe, { signal }), staleTime: STALE.office });
}

/** Who is signed in here. */
export function useMe() {
  return useQuery(meQuery());
}
