import { endpoint } from './endpoint.ts';
import type * as schema from './specifications-schema.ts';

export type {
  CorrectionProposal,
  CorrectionRow,
  CutPair,
  DayComparison,
  SpecificationCopy,
  SpecificationDraft,
  SpecificationEdition,
} from './specifications-schema.ts';

const AT = '/api/specifications/:specificationId';

export const listSpecifications = endpoint<typeof schema.listSpecificationsSchema>('GET', '/api/specifications', [
  'owner',
]);
export const getSpecification = endpoint<typeof schema.getSpecificationSchema>('GET', AT, ['owner']);
/** Makes a new edition; cutting days keep the one that they were planned with. */
export const saveSpecification = endpoint<typeof schema.saveSpecificationSchema>('POST', '/api/specifications', [
  'owner',
]);
/** A name of its own for what another edition or a shipped specification says. */
export const copySpecification = endpoint<typeof schema.copySpecificationSchema>('POST', '/api/specifications/copies', [
  'owner',
]);
/** A new edition with the figures that came with the program. */
export const restoreSpecification = endpoint<typeof schema.restoreSpecificationSchema>('POST', `${AT}/restore`, [
  'owner',
]);
/** All editions of the name leave the choice for new cutting days, or come back into it. */
export const retireSpecification = endpoint<typeof schema.retireSpecificationSchema>('PUT', `${AT}/retirement`, [
  'owner',
]);
/** Foreseen against weighed, by cut, of one cutting day. */
export const compareDay = endpoint<typeof schema.compareDaySchema>('GET', '/api/cutting-days/:dayId/comparison', [
  'owner',
]);
/** The percentages that the farm's own scales propose. */
export const getCorrection = endpoint<typeof schema.getCorrectionSchema>('GET', `${AT}/correction`, ['owner']);
export const decideCorrection = endpoint<typeof schema.decideCorrectionSchema>('POST', `${AT}/correction`, ['owner']);
