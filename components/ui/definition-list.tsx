import type { ReactNode } from 'react';

export type Definition = {
  term: string;
  value: ReactNode;
  /** A quiet second line under the term. */
  note?: string | undefined;
  strong?: boolean;
};

type DefinitionListProps = {
  items: readonly Definition[];
  ruled?: boolean;
  /** Values in words rather than figures: they start in a column of their own. */
  facts?: boolean;
};

/** Pairs of a word and its figure, one under the other: totals, the facts of an animal. */
export function DefinitionList({ items, ruled = false, facts = false }: DefinitionListProps) {
  const look = ['w-definitions', ruled && 'w-definitions-ruled', facts && 'w-definitions-facts'];
  return (
    <dl className={look.filter(Boolean).join(' ')}>
      {items.map((item) => (
        <div key={item.term} className={item.strong ? 'w-definition w-definition-strong' : 'w-definition'}>
          <dt>
            {item.term}
            {item.note ? <span className="w-choice-note">{item.note}</span> : null}
          </dt>
          <dd>{item.value}</dd>
        </div>
      ))}
    </dl>
  );
}
