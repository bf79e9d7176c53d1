import { useQuery, type QueryKey, type UseQueryOptions } from '@tanstack/react-query';
import type { Answer, CallInput, Endpoint, EndpointSchema } from '#shared/contracts/endpoint.ts';
import { AppError } from '#shared/errors.ts';
import { call } from './api.ts';

/** What a page's loader found. A plain object: it travels in the page as JSON. */
export type Loaded<Data> = { state: 'ready'; data: Data; at: number } | { state: 'missing' } | { state: 'failed' };

/** For loaders: a refusal becomes a state of the page, so that the page itself can say it. */
export async function load<S extends EndpointSchema>(
  endpoint: Endpoint<S>,
  input: CallInput<S>,
): Promise<Loaded<Answer<S>>> {
  try {
    return { state: 'ready', data: await call(endpoint, input), at: Date.now() };
  } catch (error) {
    const isNoSuchAddress = error instanceof AppError && ['NOT_FOUND', 'INVALID_INPUT'].includes(error.code);
    return { state: isNoSuchAddress ? 'missing' : 'failed' };
  }
}

/** A query that starts with what the page brought along. When that has aged, or the loader failed, it asks again. */
export function useLoaded<Data, Key extends QueryKey>(
  options: UseQueryOptions<Data, Error, Data, Key>,
  loaded: Loaded<Data>,
) {
  return useQuery({
    ...options,
    enabled: loaded.state !== 'missing',
    ...(loaded.state === 'ready' ? { initialData: loaded.data, initialDataUpdatedAt: loaded.at } : {}),
  } as UseQueryOptions<Data, Error, Data, Key>);
}
