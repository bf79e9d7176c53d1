import { EngineError } from '#shared/engine/engine-error.ts';

/**
 * Places on the fifteen-point scales, in tenths: P- is 10, E+ is 150, fat 1- is 10, 5+ is 150. The order of the classes
 * follows from the Union scale (Regulation (EU) 1308/2013, annex IV, as kept in Great Britain), each class split in three;
 * the numbers are from memory, as Irish papers use them. Where a British sub-class lies on it is common practice.
 */
const CONFORMATION_TENTHS: Readonly<Record<string, number>> = {
  '-P': 15,
  P: 20,
  'P+': 25,
  '-O': 45,
  O: 50,
  'O+': 55,
  R: 80,
  '-U': 105,
  U: 110,
  'U+': 115,
  E: 140,
  S: 150,
};

const FAT_TENTHS: Readonly<Record<string, number>> = {
  '1': 20,
  '2': 50,
  '3': 80,
  '4': 110,
  '4L': 105,
  '4H': 115,
  '5': 140,
  '5L': 135,
  '5H': 145,
};

/** Worst to best, and leanest to fattest. */
export const CONFORMATIONS = ['-P', 'P+', '-O', 'O+', 'R', '-U', 'U+', 'E'] as const;
export const FAT_CLASSES = ['1', '2', '3', '4L', '4H', '5L', '5H'] as const;

function place(scale: Readonly<Record<string, number>>, name: string, what: string): number {
  const tenths = scale[name.trim().toUpperCase()];
  if (tenths !== undefined) return tenths;
  throw new EngineError('CLASS_UNKNOWN', `There is no ${what} ${name}. Enter the class as the kill sheet prints it.`, {
    node: what,
    figures: { given: name, known: Object.keys(scale).join(', ') },
  });
}

/** Tenths of a point, 15 to 150. Refuses with CLASS_UNKNOWN. S is read as E+, the top of the scale. */
export function conformationTenths(name: string): number {
  return place(CONFORMATION_TENTHS, name, 'conformation class');
}

/** Tenths of a point, 20 to 145. Refuses with CLASS_UNKNOWN. */
export function fatTenths(name: string): number {
  return place(FAT_TENTHS, name, 'fat class');
}

const STEPS: Readonly<Record<string, number>> = { '-': 10, '=': 20, '+': 30 };

/** A class of the full fifteen-point scale, `U=` or `4-`, in tenths of a point. Refuses with CLASS_UNKNOWN. */
export function fifteenPointTenths(name: string): number {
  const at = Math.max('PORUE'.indexOf(name.charAt(0)), '12345'.indexOf(name.charAt(0)));
  const step = STEPS[name.slice(1)];
  if (at >= 0 && step !== undefined) return at * 30 + step;
  throw new EngineError('CLASS_UNKNOWN', `There is no class ${name} on the fifteen-point scale.`, {
    node: 'class',
    figures: { given: name },
  });
}
