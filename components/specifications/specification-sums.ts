import { formatPercent } from '#shared/domain/words.ts';
import type { SpecificationFault } from '#shared/engine/figures/check-specification.ts';
import type { Quarter, Specification, Tissue, Tissues, Way } from '#shared/engine/figures/specification.ts';
import { TISSUES } from '#shared/engine/figures/tissues.ts';

export const WHOLE_PPHT = 100_000;

export function totalOf(tissues: Tissues): number {
  return TISSUES.reduce((sum, tissue) => sum + tissues[tissue], 0);
}

export function sumOfQuarter(quarter: Quarter): number {
  return quarter.primals.reduce((sum, { tissues }) => sum + totalOf(tissues), 0);
}

export function sumOfSide({ quarters }: Specification): number {
  return quarters.reduce((sum, { sharePpht }) => sum + sharePpht, 0);
}

/** What the lines of a way take of one tissue of one primal, together. */
export function sumOfTakes(way: Way, primalId: string, tissue: Tissue): number {
  const takes = way.lines.flatMap((line) => line.takes.filter((take) => take.primalId === primalId));
  return takes.reduce((sum, take) => sum + take[tissue], 0);
}

/** `adds up to 51.2 %`, and how much is missing or too much where it should be otherwise. */
export function sumWords(sumPpht: number, expectedPpht: number): string {
  const words = `adds up to ${formatPercent(sumPpht)}`;
  if (sumPpht === expectedPpht) return words;
  const gap = formatPercent(Math.abs(expectedPpht - sumPpht));
  return `${words}: ${gap} ${sumPpht < expectedPpht ? 'missing' : 'too much'}`;
}

/** Where in the editor somebody is: the side, a quarter, a primal, a choice, a way, or on a phone one line of it. */
export type Place =
  | { kind: 'side' }
  | { kind: 'quarter'; id: 'fore' | 'hind' }
  | { kind: 'primal'; id: string }
  | { kind: 'choice'; id: string }
  | { kind: 'way'; choiceId: string; id: string }
  | { kind: 'line'; choiceId: string; wayId: string; id: string };

export const isSamePlace = (a: Place, b: Place) => JSON.stringify(a) === JSON.stringify(b);

/** The place at which a fault can be put right. */
export function placeOfFault(draft: Specification, fault: SpecificationFault): Place {
  const [first = '', second] = fault.node.split('/');
  if (first === 'fore' || first === 'hind') return { kind: 'quarter', id: first };
  if (second !== undefined) return { kind: 'way', choiceId: first, id: second };
  return draft.choices.some(({ id }) => id === first) ? { kind: 'choice', id: first } : { kind: 'side' };
}

/** Whether something is wrong at a place or below it. */
export function isWrongAt(place: Place, draft: Specification, faults: readonly SpecificationFault[]): boolean {
  return faults.some((fault) => {
    const at = placeOfFault(draft, fault);
    if (isSamePlace(at, place)) return true;
    return place.kind === 'choice' && at.kind === 'way' && at.choiceId === place.id;
  });
}
