import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import type { Request, Response, Router } from 'express';
import type { Answer, Endpoint, EndpointSchema, Input } from '#shared/contracts/endpoint.ts';
import { mayCall, type Role } from '#shared/domain/roles.ts';
import { AppError } from '#shared/errors.ts';
import type { Auth } from '#server/auth/auth.ts';
import { fieldsOf } from './problem.ts';

export type Caller = { id: string; name: string; email: string; role: Role };

/** The routes of the API and, beside them, the table of who may call what. */
export type Api = { router: Router; endpoints: Endpoint<EndpointSchema>[]; auth: Auth };

export type Download = {
  contentType: string;
  filename: string;
  body: string | Buffer | Readable;
  isImmutable?: boolean;
};

type Handler<S extends EndpointSchema, R> = (input: Input<S>, caller: Caller | null) => Promise<R>;

/** Parses the input, checks who calls, runs the handler and parses the answer, so that nothing unlisted leaks. */
export function route<S extends EndpointSchema>(
  api: Api,
  endpoint: Endpoint<S>,
  { schema, handle }: { schema: S; handle: Handler<S, Answer<S>> },
): void {
  register(api, endpoint, async (request, response) => {
    const caller = await admit(api.auth, endpoint, request);
    const answer = await handle(readInput(schema, request), caller);
    response.json(schema.answer.parse(answer));
  });
}

/** Like `route`, for what is no JSON: calendar files, PDFs, models. */
export function download<S extends EndpointSchema>(
  api: Api,
  endpoint: Endpoint<S>,
  { schema, handle }: { schema: S; handle: Handler<S, Download> },
): void {
  register(api, endpoint, async (request, response) => {
    const caller = await admit(api.auth, endpoint, request);
    const file = await handle(readInput(schema, request), caller);
    response.setHeader('Content-Type', file.contentType);
    // Named by what is in it: nobody needs to ask for it twice, and it is shown in the page rather than saved.
    if (file.isImmutable) response.setHeader('Cache-Control', 'public, max-age=31536000, immutable');
    else response.setHeader('Content-Disposition', `attachment; filename="${file.filename}"`);
    if (file.body instanceof Readable) await pipeline(file.body, response);
    else response.send(file.body);
  });
}

function register<S extends EndpointSchema>(
  api: Api,
  endpoint: Endpoint<S>,
  answer: (request: Request, response: Response) => Promise<void>,
): void {
  api.endpoints.push({ method: endpoint.method, path: endpoint.path, access: endpoint.access });
  const method = endpoint.method.toLowerCase() as 'get' | 'post' | 'put' | 'delete';
  api.router[method](endpoint.path, answer);
}

async function admit<S extends EndpointSchema>(
  auth: Auth,
  endpoint: Endpoint<S>,
  request: Request,
): Promise<Caller | null> {
  const caller = await readCaller(auth, request);
  if (mayCall(endpoint.access, caller?.role ?? null)) return caller;
  if (!caller) throw new AppError('UNAUTHENTICATED', 'Please sign in first.');
  throw new AppError('FORBIDDEN', 'Your account may not do this.');
}

async function readCaller(auth: Auth, request: Request): Promise<Caller | null> {
  if (!request.headers.cookie) return null;
  const headers = new Headers({ cookie: request.headers.cookie });
  const session = await auth.api.getSession({ headers });
  if (!session) return null;
  const { id, name, email, role } = session.user;
  return { id, name, email, role: role as Role };
}

function readInput<S extends EndpointSchema>(schema: S, request: Request): Input<S> {
  const parts = { params: request.params, query: request.query, body: request.body as unknown };
  const input: Record<string, unknown> = {};
  for (const part of ['params', 'query', 'body'] as const) {
    const parsed = schema[part]?.safeParse(parts[part] ?? {});
    if (parsed && !parsed.success) {
      if (part === 'params') throw new AppError('NOT_FOUND', 'There is nothing at this address.');
      throw new AppError('INVALID_INPUT', 'Nothing was saved: something is missing or not right.', {
        fields: fieldsOf(parsed.error),
      });
    }
    input[part] = parsed?.data;
  }
  return input as Input<S>;
}

/** The caller of a route that is not public; the guard has run before. */
export function signedIn(caller: Caller | null): Caller {
  if (!caller) throw new AppError('UNAUTHENTICATED', 'Please sign in first.');
  return caller;
}
