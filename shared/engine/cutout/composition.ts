import { conformationTenths, fatTenths } from '#shared/engine/figures/class-scale.ts';
import type { Tissues } from '#shared/engine/figures/specification.ts';
import type { Clamp } from './cutout-types.ts';

/**
 * What a carcase of a class is made of, parts per 100,000 of cold weight.
 *
 * Slopes of meat: Conroy, Drennan, Kenny and McGee, 336 steers of about two years, fifteen-point scales: +11.2 g a kg for
 * a point of conformation, -8.2 g a kg for a point of fat; observed over conformation 2.0 to 12.0 and fat 2.8 to 13.3.
 * Slopes of fat and bone on conformation follow Drennan's dissection of 507 steers (suckler-bred against Holstein: +6.2
 * meat, -1.7 fat, -4.5 bone), scaled to the same 1.12. The anchor (70.0 meat, 10.7 fat, 18.3 bone, 1.0 loss at R4L) and
 * how a point of fat divides between fat and bone are common practice.
 */
const ANCHOR = { conformation: 80, fatClass: 105, meat: 70_000, fat: 10_700, loss: 1_000 } as const;
/** Parts per 100,000 for a tenth of a point. */
const SLOPES = { meat: { conformation: 112, fatClass: -82 }, fat: { conformation: -31, fatClass: 107 } } as const;

const RANGE = {
  conformation: { low: 20, high: 120 },
  'fat class': { low: 28, high: 133 },
  /** New Zealand grading 1986 saw 59 % at the fattest; the Eblex cutting project spans the top. */
  meat: { low: 58_000, high: 78_000 },
  fat: { low: 1_000, high: 100_000 },
} as const;

export type Composition = { tissues: Tissues; clamps: Clamp[] };

type What = keyof typeof RANGE;

function clampTo(what: What, value: number, clamps: Clamp[]): number {
  const { low, high } = RANGE[what];
  const to = Math.min(high, Math.max(low, value));
  if (to === value) return value;
  const isScale = what === 'conformation' || what === 'fat class';
  const say = (figure: number) => (isScale ? (figure / 10).toFixed(1) : `${(figure / 1000).toFixed(1)} %`);
  const sentence = isScale
    ? `Outside the range of the source: ${what} ${say(value)} on the fifteen-point scale is taken as ${say(to)}.`
    : `Outside the range of the source: ${what} ${say(value)} of the carcase is taken as ${say(to)}.`;
  clamps.push({ what, from: value, to, sentence });
  return to;
}

/** By points in tenths; see `composition`. */
export function compositionOfPoints(points: { conformation: number; fatClass: number }): Composition {
  const clamps: Clamp[] = [];
  const conformation = clampTo('conformation', points.conformation, clamps) - ANCHOR.conformation;
  const fatClass = clampTo('fat class', points.fatClass, clamps) - ANCHOR.fatClass;
  const line = (tissue: 'meat' | 'fat') =>
    ANCHOR[tissue] + SLOPES[tissue].conformation * conformation + SLOPES[tissue].fatClass * fatClass;
  const meat = clampTo('meat', line('meat'), clamps);
  const fat = clampTo('fat', line('fat'), clamps);
  return { tissues: { meat, fat, bone: 100_000 - meat - fat - ANCHOR.loss, loss: ANCHOR.loss }, clamps };
}

/**
 * Meat, fat, bone and loss of a carcase of this class in parts per 100,000, and every figure that lay outside the range
 * of the source and was brought back to its edge. Bone takes what a clamp leaves. Refuses with CLASS_UNKNOWN.
 */
export function composition(conformation: string, fatClass: string): Composition {
  return compositionOfPoints({ conformation: conformationTenths(conformation), fatClass: fatTenths(fatClass) });
}
