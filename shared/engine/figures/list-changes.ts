import type { Specification } from './specification.ts';
import { TISSUES } from './tissues.ts';

/** One share that differs between two specifications, in parts per 100,000; null where one of them has no such share. */
export type ShareChange = { node: string; name: string; fromPpht: number | null; toPpht: number | null };

const LINE_NAMES: Readonly<Record<string, string>> = { bone: 'Waste bone', fat: 'Fat cut off', loss: 'Cutting loss' };

type Share = { name: string; ppht: number };

/** Tissues of primals by `brisket/meat`, shares of lines by `brisket/rolled/brisket-joint/brisket/meat`. */
function listShares(specification: Specification): Map<string, Share> {
  const shares = new Map<string, Share>();
  const primals = specification.quarters.flatMap((quarter) => quarter.primals);
  const nameOf = (id: string) => primals.find((primal) => primal.id === id)?.name ?? id;
  const cutName = (id: string) => LINE_NAMES[id] ?? specification.cuts.find((cut) => cut.id === id)?.name ?? id;
  for (const primal of primals) {
    for (const tissue of TISSUES) {
      shares.set(`${primal.id}/${tissue}`, { name: `${primal.name}, ${tissue}`, ppht: primal.tissues[tissue] });
    }
  }
  for (const choice of specification.choices) {
    for (const way of choice.ways) {
      for (const line of way.lines) {
        for (const take of line.takes) {
          for (const tissue of TISSUES) {
            const name = `${choice.name}, ${way.name}: ${cutName(line.id)}, of the ${tissue} of ${nameOf(take.primalId)}`;
            const node = `${choice.id}/${way.id}/${line.id}/${take.primalId}/${tissue}`;
            if (take[tissue] > 0) shares.set(node, { name, ppht: take[tissue] });
          }
        }
      }
    }
  }
  return shares;
}

/** Every share that the later specification has otherwise, in its own order; what it no longer has comes last. */
export function listChanges(before: Specification, after: Specification): ShareChange[] {
  const old = listShares(before);
  const now = listShares(after);
  const changed = [...now].flatMap(([node, { name, ppht }]): ShareChange[] => {
    const from = old.get(node)?.ppht ?? null;
    return from === ppht ? [] : [{ node, name, fromPpht: from, toPpht: ppht }];
  });
  const gone = [...old].filter(([node]) => !now.has(node));
  return [...changed, ...gone.map(([node, { name, ppht }]) => ({ node, name, fromPpht: ppht, toPpht: null }))];
}
