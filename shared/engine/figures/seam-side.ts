import { cutsOf } from './british-cuts.ts';
import { REFERENCE_CLASS, referenceNarrowPrimals, referenceQuarters, toQuarter } from './reference-tissues.ts';
import { seamChoices } from './seam-choices.ts';
import type { Primal, Specification } from './specification.ts';

/**
 * Neck and chuck of the reference side taken apart where the neck ends: common practice, 31 % of the meat in the neck.
 * Together they are what the published table has as one.
 */
const NECK: Primal = {
  id: 'neck',
  name: 'Neck',
  shortName: 'Neck',
  hasVertebrae: true,
  tissues: { meat: 3_400, fat: 500, bone: 1_200, loss: 60 },
};
const CHUCK_EYE: Primal = {
  id: 'chuck-eye',
  name: 'Chuck eye',
  shortName: 'Chuck',
  hasVertebrae: true,
  tissues: { meat: 7_654, fat: 1_400, bone: 2_100, loss: 130 },
};

const [fore, hind] = referenceQuarters;
const forePrimals = fore.primals.flatMap((primal) => (primal.id === 'chuck' ? [NECK, CHUCK_EYE] : [primal]));
const choices = [...seamChoices];

/** A side for farms that sell steak: seamed muscles of shoulder, rump, flank and thick flank, little dice. */
export const seamSide: Specification = {
  id: 'seam-side',
  name: 'Seam-butchery side, steak-led',
  source:
    'Meat by primal: Judge et al. 2019, J Anim Sci 97:2769-2779, table 1, scaled to 70 % of cold weight. Neck and chuck apart, bone, fat, loss and muscles: common practice.',
  reference: { ...REFERENCE_CLASS },
  quarters: [toQuarter('fore', forePrimals), hind],
  narrowPrimals: referenceNarrowPrimals.map((group) => ({
    ...group,
    primalIds: group.primalIds.flatMap((id) => (id === 'chuck' ? ['neck', 'chuck-eye'] : [id])),
  })),
  choices,
  cuts: cutsOf(choices),
};
