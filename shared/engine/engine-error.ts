import { AppError, type ErrorFigures } from '#shared/errors.ts';

export type EngineCode =
  | 'SPEC_NOT_100'
  | 'MEASURED_EXCEEDS_PARENT'
  | 'CLASS_UNKNOWN'
  | 'WEIGHT_OUT_OF_RANGE'
  | 'RECIPE_INFEASIBLE'
  | 'CONFIRMED_EXCEEDS_STOCK'
  | 'LOCK_CONFLICT'
  | 'NOT_FILLABLE'
  | 'SOLVER_FAILED';

/** A refusal of the engine: which node or row it is about, and the figures with their units in the key. */
export class EngineError extends AppError {
  readonly node: string;

  constructor(code: EngineCode, message: string, about: { node: string; figures?: ErrorFigures }) {
    super(code, message, about.figures ? { figures: about.figures } : {});
    this.name = 'EngineError';
    this.node = about.node;
  }
}
