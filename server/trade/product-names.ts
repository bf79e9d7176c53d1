import { listSpecificationRows } from '#server/carcases/cutting-day-queries.ts';
import { readSpecification } from '#server/carcases/day-figures.ts';
import type { Db, Tx } from '#server/deps.ts';
import { listCutNames } from './trade-queries.ts';

/** Name of everything that a price list may hold, by `side`, `fore`, `hind`, `primal:<id>` or `cut:<id>`. */
export type ProductNames = ReadonlyMap<string, string>;

export async function readProductNames(db: Db | Tx): Promise<ProductNames> {
  const names = new Map([
    ['side', 'Side'],
    ['fore', 'Forequarter'],
    ['hind', 'Hindquarter'],
  ]);
  for (const { id } of await listSpecificationRows(db)) {
    const { quarters } = await readSpecification(db, id);
    for (const primal of quarters.flatMap((quarter) => quarter.primals)) names.set(`primal:${primal.id}`, primal.name);
  }
  for (const [id, name] of await listCutNames(db)) names.set(`cut:${id}`, name);
  return names;
}
