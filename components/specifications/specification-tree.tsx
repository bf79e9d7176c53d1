import type { ReactNode } from 'react';
import { formatPercent } from '#shared/domain/words.ts';
import type { SpecificationFault } from '#shared/engine/figures/check-specification.ts';
import type { Specification } from '#shared/engine/figures/specification.ts';
import { isSamePlace, isWrongAt, sumOfQuarter, sumOfSide, totalOf, type Place } from './specification-sums.ts';

type TreeProps = {
  draft: Specification;
  faults: readonly SpecificationFault[];
  /** Where somebody is; undefined shows the tree with everything folded. */
  place: Place | undefined;
  onGo: (place: Place) => void;
};

/** The side, its quarters and primals, then the choices and their ways; a branch opens where somebody is. */
export function SpecificationTree({ draft, faults, place, onGo }: TreeProps) {
  const nodeOf = (to: Place, name: string, figure?: string) => (
    <TreeNode
      name={name}
      figure={figure}
      isCurrent={place !== undefined && isSamePlace(to, place)}
      isWrong={isWrongAt(to, draft, faults)}
      onPress={() => onGo(to)}
    />
  );
  return (
    <nav aria-label="Parts of the specification">
      <ul className="w-tree">
        <li>{nodeOf({ kind: 'side' }, 'Side', formatPercent(sumOfSide(draft)))}</li>
        {draft.quarters.map((quarter) => (
          <li key={quarter.id}>
            {nodeOf({ kind: 'quarter', id: quarter.id }, quarter.name, formatPercent(sumOfQuarter(quarter)))}
            {isWithinQuarter(place, quarter.id, draft) ? (
              <ul>
                {quarter.primals.map(({ id, name, tissues }) => (
                  <li key={id}>{nodeOf({ kind: 'primal', id }, name, formatPercent(totalOf(tissues)))}</li>
                ))}
              </ul>
            ) : null}
          </li>
        ))}
        {draft.choices.map((choice) => (
          <li key={choice.id}>
            {nodeOf(
              { kind: 'choice', id: choice.id },
              `Ways of ${choice.name.toLowerCase()}`,
              String(choice.ways.length),
            )}
            {isWithinChoice(place, choice.id) ? (
              <ul>
                {choice.ways.map((way) => (
                  <li key={way.id}>{nodeOf({ kind: 'way', choiceId: choice.id, id: way.id }, way.name)}</li>
                ))}
              </ul>
            ) : null}
          </li>
        ))}
      </ul>
    </nav>
  );
}

function isWithinQuarter(place: Place | undefined, id: string, draft: Specification): boolean {
  if (place?.kind === 'quarter') return place.id === id;
  if (place?.kind !== 'primal') return false;
  const quarter = draft.quarters.find((one) => one.id === id);
  return quarter?.primals.some((primal) => primal.id === place.id) ?? false;
}

function isWithinChoice(place: Place | undefined, id: string): boolean {
  return (place?.kind === 'choice' && place.id === id) || (place?.kind === 'way' && place.choiceId === id);
}

type TreeNodeProps = {
  name: string;
  figure?: string | undefined;
  isCurrent?: boolean;
  isWrong: boolean;
  onPress: () => void;
};

/** One row of a tree: where it leads, its figure, and a mark where something is wrong. */
export function TreeNode({ name, figure, isCurrent = false, isWrong, onPress }: TreeNodeProps): ReactNode {
  return (
    <button type="button" className="w-tree-node" aria-current={isCurrent} onClick={onPress}>
      <span>{name}</span>
      <span className="w-tree-figure">{figure}</span>
      {isWrong ? (
        <span className="w-tree-wrong">
          <span aria-hidden="true">!</span>
          <span className="w-hidden">, does not add up</span>
        </span>
      ) : null}
    </button>
  );
}
