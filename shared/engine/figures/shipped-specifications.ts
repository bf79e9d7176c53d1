import { cowSide } from './cow-side.ts';
import { seamSide } from './seam-side.ts';
import type { Specification } from './specification.ts';
import { traditionalSide } from './traditional-side.ts';

/** The specifications that come with the program, by their id. A farm works with copies of its own. */
export const SHIPPED_SPECIFICATIONS: readonly Specification[] = [traditionalSide, seamSide, cowSide];

/** The shipped one of this id; a copy keeps the id of the one that it came from. */
export function findShipped(id: string): Specification | undefined {
  return SHIPPED_SPECIFICATIONS.find((specification) => specification.id === id);
}
