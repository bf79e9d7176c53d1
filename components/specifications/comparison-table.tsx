import { Table } from '#components/ui/table.tsx';
import type { CutPair } from '#shared/contracts/specifications.ts';
import { formatGrams } from '#shared/domain/words.ts';
import { differencePercent } from './specification-words.ts';

/** Foreseen against weighed, by cut: only what was weighed counts, on both sides. */
export function ComparisonTable({ caption, cuts }: { caption: string; cuts: readonly CutPair[] }) {
  return (
    <Table
      caption={caption}
      captionShown
      rows={cuts}
      rowKey={({ id }) => id}
      empty="Nothing of it was weighed."
      columns={[
        { id: 'name', title: 'Cut', cell: ({ id, name }) => (id.startsWith('primal:') ? `${name}, whole` : name) },
        { id: 'foreseen', title: 'Foreseen', align: 'end', cell: ({ estimatedGrams }) => formatGrams(estimatedGrams) },
        { id: 'weighed', title: 'Weighed', align: 'end', cell: ({ weighedGrams }) => formatGrams(weighedGrams) },
        {
          id: 'difference',
          title: 'Difference',
          align: 'end',
          cell: ({ weighedGrams, estimatedGrams }) => differenceGrams(weighedGrams - estimatedGrams),
        },
        {
          id: 'percent',
          title: 'In per cent',
          align: 'end',
          cell: ({ weighedGrams, estimatedGrams }) => differencePercent(weighedGrams, estimatedGrams),
        },
      ]}
    />
  );
}

function differenceGrams(more: number): string {
  if (more === 0) return 'none';
  return `${more > 0 ? '+' : '−'} ${formatGrams(Math.abs(more))}`;
}
