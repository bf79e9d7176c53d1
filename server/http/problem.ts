import type { ErrorRequestHandler, Request, Response } from 'express';
import type { ZodError } from 'zod';
import { AppError, type ErrorCode, type FieldErrors, type Problem } from '#shared/errors.ts';
import { log } from './log.ts';

const TITLES: Partial<Record<ErrorCode, string>> = {
  INVALID_INPUT: 'Something in the form is not right',
  UNAUTHENTICATED: 'Not signed in',
  FORBIDDEN: 'Not allowed',
  NOT_FOUND: 'Not found',
  OUT_OF_STOCK: 'Not enough left',
  STATE_CHANGED: 'Changed meanwhile',
  SLOT_FULL: 'That time is full',
  CUTOFF_PASSED: 'Too late for this day',
  BASKET_EXPIRED: 'The basket has expired',
  TOO_MANY_REQUESTS: 'Too many at once',
  INTERNAL: 'A fault of ours',
  PAYMENTS_DOWN: 'Payments cannot be reached',
};

/** Path of each refused field and its sentence, the first one where a field has several. */
export function fieldsOf(error: ZodError): FieldErrors {
  const fields: FieldErrors = {};
  for (const issue of error.issues) {
    const path = issue.code === 'unrecognized_keys' ? [...issue.path, ...issue.keys.slice(0, 1)] : issue.path;
    fields[path.join('.') || 'body'] ??= issue.message;
  }
  return fields;
}

export function sendProblem(response: Response, error: AppError): void {
  const problem: Problem = {
    type: 'about:blank',
    title: TITLES[error.code] ?? 'Refused',
    status: error.status,
    detail: error.message,
    code: error.code,
    ...(error.fields ? { fields: error.fields } : {}),
    ...(error.figures ? { figures: error.figures } : {}),
  };
  response.status(error.status).type('application/problem+json').send(JSON.stringify(problem));
}

/** Malformed and oversized bodies come from express.json with a status and a type. */
function isBodyError(error: unknown): error is Error & { type: string; status: number } {
  return error instanceof Error && 'type' in error && 'status' in error && typeof error.type === 'string';
}

function asAppError(error: unknown, request: Request): AppError {
  if (error instanceof AppError) return error;
  if (isBodyError(error)) {
    if (error.type === 'entity.too.large')
      return new AppError('TOO_LARGE', 'This is more than can be sent at once. Nothing was saved.');
    if (error.status >= 400 && error.status < 500) {
      return new AppError('INVALID_INPUT', 'The request could not be read. Nothing was saved.');
    }
  }
  if (error instanceof URIError) return new AppError('NOT_FOUND', 'There is no such page.');
  log.error({ err: error, requestId: request.id, path: request.path }, 'unexpected');
  return new AppError('INTERNAL', 'This did not work, through a fault of ours. Nothing was saved; please try again.');
}

// Express knows an error handler by its four parameters.
// eslint-disable-next-line max-params -- see above
export const answerErrors: ErrorRequestHandler = (error, request, response, next) => {
  if (response.headersSent) {
    next(error);
    return;
  }
  sendProblem(response, asAppError(error, request));
};
