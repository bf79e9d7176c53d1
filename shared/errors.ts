/** Every code that the API answers with, and its status. `detail` is the sentence shown; the code only chooses behaviour. */
export const ERROR_STATUS = {
  INVALID_INPUT: 400,
  BAD_SIGNATURE: 400,
  UNAUTHENTICATED: 401,
  PAYMENT_DECLINED: 402,
  FORBIDDEN: 403,
  NOT_FOUND: 404,
  OUT_OF_STOCK: 409,
  STATE_CHANGED: 409,
  SLOT_FULL: 409,
  CUTOFF_PASSED: 409,
  ALREADY_KNOWN: 409,
  BASKET_EXPIRED: 410,
  TOO_LARGE: 413,
  SPEC_NOT_100: 422,
  MEASURED_EXCEEDS_PARENT: 422,
  CLASS_UNKNOWN: 422,
  WEIGHT_OUT_OF_RANGE: 422,
  RECIPE_INFEASIBLE: 422,
  CONFIRMED_EXCEEDS_STOCK: 422,
  LOCK_CONFLICT: 422,
  NOT_FILLABLE: 422,
  SOLVER_FAILED: 422,
  TOO_MANY_REQUESTS: 429,
  INTERNAL: 500,
  PAYMENTS_DOWN: 503,
} as const;

export type ErrorCode = keyof typeof ERROR_STATUS;

/** Path of an input field -> the sentence to show beside it. */
export type FieldErrors = Record<string, string>;

/** Figures that belong to a refusal: how many are left, both weights. */
export type ErrorFigures = Record<string, number | string | null>;

/** The body of every error (RFC 9457). `code`, `fields` and `figures` are our extension members. */
export type Problem = {
  type: string;
  title: string;
  status: number;
  detail: string;
  code: ErrorCode;
  fields?: FieldErrors;
  figures?: ErrorFigures;
};

/** An expected refusal. Anything else that is thrown is a bug and is answered as INTERNAL. */
export class AppError extends Error {
  readonly code: ErrorCode;
  readonly fields: FieldErrors | undefined;
  readonly figures: ErrorFigures | undefined;

  constructor(code: ErrorCode, message: string, more: { fields?: FieldErrors; figures?: ErrorFigures } = {}) {
    super(message);
    this.name = 'AppError';
    this.code = code;
    this.fields = more.fields;
    this.figures = more.figures;
  }

  get status(): number {
    return ERROR_STATUS[this.code];
  }
}
