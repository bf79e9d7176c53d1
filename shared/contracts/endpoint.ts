import type { z } from 'zod';
import type { Access } from '#shared/domain/roles.ts';

/** The zod schemas of one endpoint, kept in `<subject>-schema.ts` so that a page can name an endpoint without loading zod. */
export type EndpointSchema = {
  params?: z.ZodType;
  query?: z.ZodType;
  body?: z.ZodType;
  answer: z.ZodType;
};

export type Endpoint<S extends EndpointSchema> = {
  method: 'GET' | 'POST' | 'PUT' | 'DELETE';
  /** Express path with `:name` parameters. */
  path: string;
  access: Access;
  /** Carries the types only; never set. */
  readonly schema?: S;
};

type Parsed<S, K extends string> = K extends keyof S
  ? S[K] extends z.ZodType
    ? z.output<S[K]>
    : undefined
  : undefined;
type Sent<S, K extends string> = K extends keyof S
  ? S[K] extends z.ZodType
    ? { [P in K]: z.input<S[K]> }
    : unknown
  : unknown;

/** What a handler is given, parsed. */
export type Input<S extends EndpointSchema> = {
  params: Parsed<S, 'params'>;
  query: Parsed<S, 'query'>;
  body: Parsed<S, 'body'>;
};

/** What a caller sends: only the parts that the endpoint has. */
export type CallInput<S extends EndpointSchema> = Sent<S, 'params'> &
  Sent<S, 'query'> &
  Sent<S, 'body'> & { signal?: AbortSignal };

export type Answer<S extends EndpointSchema> = z.output<S['answer']>;

export function endpoint<S extends EndpointSchema>(
  method: Endpoint<S>['method'],
  path: string,
  access: Access,
): Endpoint<S> {
  return { method, path, access };
}
