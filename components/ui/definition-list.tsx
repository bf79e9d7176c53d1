import type { ReactNode } from 'react';

export type Definition = {
  term: string;
  value: ReactNode;
  /** A quiet second line under the term. */
  note?: string | undefined;
  strong?: boolean;
};

/** Pairs of a word and its figure, one under the other: totals, the facts of an animal. */
export function DefinitionList({ items, ruled = false }: { items: readonly Definition[]; ruled?: boolean }) {
  return (
    <dl className={ruled ? 'w-definitions w-definitions-ruled' : 'w-definitions'}>
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
