import { formatPercent } from '#shared/domain/words.ts';
import { EngineError } from '#shared/engine/engine-error.ts';
import { totalTissues } from './reference-tissues.ts';
import type { Choice, Specification, Way } from './specification.ts';
import { TISSUES } from './tissues.ts';

const WHOLE = 100_000;

/** What is wrong at one node, in a sentence; `sumPpht` where shares fail to add up. */
export type SpecificationFault = {
  /** `side`, `fore`, `fore/brisket`, `brisket/rolled`, `brisket/rolled/meat`, a cut id. */
  node: string;
  sentence: string;
  sumPpht: number | null;
  expectedPpht: number | null;
};

function sumFault(node: string, name: string, [sum, expected]: [number, number]): SpecificationFault[] {
  if (sum === expected) return [];
  const sentence = `${name} adds up to ${formatPercent(sum)}, not to ${formatPercent(expected)}.`;
  return [{ node, sentence, sumPpht: sum, expectedPpht: expected }];
}

const plainFault = (node: string, sentence: string): SpecificationFault => ({
  node,
  sentence,
  sumPpht: null,
  expectedPpht: null,
});

function repeated(ids: readonly string[]): string[] {
  if (new Set(ids).size === ids.length) return [];
  return [...new Set(ids.filter((id, at) => ids.indexOf(id) !== at))];
}

function listSideFaults(specification: Specification): SpecificationFault[] {
  const quarters = specification.quarters.flatMap((quarter) => {
    const sum = quarter.primals.reduce((all, primal) => all + totalTissues(primal.tissues), 0);
    return sumFault(quarter.id, quarter.name, [sum, quarter.sharePpht]);
  });
  const side = specification.quarters.reduce((all, quarter) => all + quarter.sharePpht, 0);
  return [...sumFault('side', 'The side', [side, WHOLE]), ...quarters];
}

function listWayFaults(choice: Choice, way: Way): SpecificationFault[] {
  const node = `${choice.id}/${way.id}`;
  const faults: SpecificationFault[] = [];
  const sums = new Map(choice.primalIds.map((id) => [id, { meat: 0, fat: 0, bone: 0, loss: 0 }]));
  for (const line of way.lines) {
    const seen = new Set<string>();
    for (const take of line.takes) {
      const sum = sums.get(take.primalId);
      if (!sum) faults.push(plainFault(node, `${way.name} takes from ${take.primalId}, which it does not cover.`));
      else for (const tissue of TISSUES) sum[tissue] += take[tissue];
      if (seen.has(take.primalId)) {
        faults.push(plainFault(node, `${way.name}: ${line.id} names ${take.primalId} twice.`));
      }
      seen.add(take.primalId);
    }
  }
  for (const [primalId, sum] of sums) {
    for (const tissue of TISSUES) {
      if (sum[tissue] === WHOLE) continue;
      faults.push(
        ...sumFault(`${node}/${primalId}/${tissue}`, `${way.name}: ${tissue} of ${primalId}`, [sum[tissue], WHOLE]),
      );
    }
  }
  for (const id of repeated(way.lines.map((line) => line.id))) {
    faults.push(plainFault(node, `${way.name} names ${id} twice.`));
  }
  return faults;
}

function listNameFaults(specification: Specification): SpecificationFault[] {
  const faults: SpecificationFault[] = [];
  const cuts = new Map(specification.cuts.map((cut) => [cut.id, cut]));
  const lists = [
    ['a primal', specification.quarters.flatMap((quarter) => quarter.primals.map((primal) => primal.id))],
    ['a choice', specification.choices.map((choice) => choice.id)],
    ['a cut', specification.cuts.map((cut) => cut.id)],
    ...specification.choices.map((choice) => ['a way', choice.ways.map((way) => way.id)] as const),
  ] as const;
  for (const [what, ids] of lists) {
    for (const id of repeated(ids)) faults.push(plainFault(id, `${id} stands twice as ${what}.`));
  }
  for (const cut of specification.cuts) {
    if (cut.minPackGrams > cut.maxPackGrams) {
      faults.push(plainFault(cut.id, `${cut.name}: the lightest pack is heavier than the heaviest.`));
    }
  }
  for (const choice of specification.choices) {
    for (const way of choice.ways) {
      for (const line of way.lines) {
        const isProduct = line.kind === 'cut' || line.kind === 'trim';
        const isRight = isProduct ? cuts.get(line.id)?.kind === line.kind : line.id === line.kind;
        if (!isRight) faults.push(plainFault(`${choice.id}/${way.id}`, `${way.name}: ${line.id} is no ${line.kind}.`));
      }
    }
  }
  return faults;
}

function listCoverFaults(specification: Specification): SpecificationFault[] {
  const faults: SpecificationFault[] = [];
  const quarterOf = new Map(
    specification.quarters.flatMap((quarter) => quarter.primals.map((primal) => [primal.id, quarter.id] as const)),
  );
  const covered = specification.choices.flatMap((choice) => choice.primalIds);
  for (const id of quarterOf.keys()) {
    const count = covered.filter((other) => other === id).length;
    if (count !== 1) faults.push(plainFault(id, `${id} is covered by ${count} choices; it must be exactly one.`));
  }
  for (const choice of specification.choices) {
    const quarters = new Set(choice.primalIds.map((id) => quarterOf.get(id)));
    if (quarters.has(undefined))
      faults.push(plainFault(choice.id, `${choice.name} covers a primal that is not there.`));
    if (quarters.size > 1) faults.push(plainFault(choice.id, `${choice.name} reaches over both quarters.`));
  }
  for (const group of specification.narrowPrimals) {
    if (group.primalIds.some((id) => !quarterOf.has(id))) {
      faults.push(plainFault(group.id, `${group.name} names a primal that is not there.`));
    }
  }
  return faults;
}

/** Everything that keeps a specification from being used, for the editor to show beside each node. */
export function listSpecificationFaults(specification: Specification): SpecificationFault[] {
  return [
    ...listSideFaults(specification),
    ...listCoverFaults(specification),
    ...listNameFaults(specification),
    ...specification.choices.flatMap((choice) => choice.ways.flatMap((way) => listWayFaults(choice, way))),
  ];
}

/** Refuses with SPEC_NOT_100 at the first fault: its node, and both shares in parts per 100,000 where it is a sum. */
export function checkSpecification(specification: Specification): void {
  const [first] = listSpecificationFaults(specification);
  if (!first) return;
  const figures = { sumPpht: first.sumPpht, expectedPpht: first.expectedPpht };
  const message = `${first.sentence} The specification was not used; correct it and try again.`;
  throw new EngineError('SPEC_NOT_100', message, { node: first.node, figures });
}
