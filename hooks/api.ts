import type { Answer, CallInput, Endpoint, EndpointSchema } from '#shared/contracts/endpoint.ts';
import { AppError, type Problem } from '#shared/errors.ts';
import { apiOrigin } from './env.ts';

/** No answer came: the line, not the farm, is at fault. TanStack Query retries these and no others. */
export class ConnectionLost extends Error {
  constructor() {
    super('There is no connection just now. Nothing is lost: try again when you are back online.');
    this.name = 'ConnectionLost';
  }
}

/** Calls an endpoint of the contract. Throws AppError with the server's sentence, or ConnectionLost. */
export async function call<S extends EndpointSchema>(endpoint: Endpoint<S>, input: CallInput<S>): Promise<Answer<S>> {
  const { params, query, body, signal } = input as {
    params?: Record<string, string>;
    query?: Record<string, string | undefined>;
    body?: unknown;
    signal?: AbortSignal;
  };
  const path = pathOf(endpoint, params ? { params } : {});
  const search = new URLSearchParams(Object.entries(query ?? {}).filter((pair): pair is [string, string] => !!pair[1]));
  const response = await fetch(`${apiOrigin()}${path}${search.size > 0 ? `?${search}` : ''}`, {
    method: endpoint.method,
    credentials: 'same-origin',
    headers: body === undefined ? {} : { 'Content-Type': 'application/json' },
    body: body === undefined ? null : JSON.stringify(body),
    signal: signal ?? null,
  }).catch((error: unknown) => {
    if (error instanceof DOMException && error.name === 'AbortError') throw error;
    throw new ConnectionLost();
  });
  if (response.ok) return (await response.json()) as Answer<S>;
  throw await readProblem(response);
}

/** The address of an endpoint, for links that the browser follows by itself, such as files to save. */
export function pathOf(endpoint: { path: string }, { params }: { params?: Record<string, string> }): string {
  return endpoint.path.replace(/:(\w+)/g, (_whole, name: string) => encodeURIComponent(params?.[name] ?? ''));
}

/** What a refused answer says. */
export async function readProblem(response: Response): Promise<Error> {
  if (!response.headers.get('content-type')?.includes('application/problem+json')) return new ConnectionLost();
  const problem = (await response.json()) as Problem;
  return new AppError(problem.code, problem.detail, {
    ...(problem.fields ? { fields: problem.fields } : {}),
    ...(problem.figures ? { figures: problem.figures } : {}),
  });
}
