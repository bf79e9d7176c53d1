import { cutsOf } from './british-cuts.ts';
import { foreChoices } from './fore-choices.ts';
import { hindChoices } from './hind-choices.ts';
import { REFERENCE_CLASS, referenceNarrowPrimals, referenceQuarters } from './reference-tissues.ts';
import type { Specification } from './specification.ts';

const choices = [...foreChoices, ...hindChoices];

/** The British side as most farms have it cut: joints, steaks, dice and mince, with each either/or that the trade knows. */
export const traditionalSide: Specification = {
  id: 'traditional-side',
  name: 'Traditional British side',
  source:
    'Meat by primal: Judge et al. 2019, J Anim Sci 97:2769-2779, table 1, scaled to 70 % of cold weight. Bone, fat, loss, ways and pack weights: common practice.',
  reference: { ...REFERENCE_CLASS },
  quarters: referenceQuarters,
  narrowPrimals: referenceNarrowPrimals,
  choices,
  cuts: cutsOf(choices),
};
