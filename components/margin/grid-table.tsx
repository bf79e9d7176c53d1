import { Table } from '#components/ui/table.tsx';
import type { PriceGrid } from '#shared/contracts/margin.ts';
import { signedRate } from './margin-words.ts';

/** The whole grid to read: what each class is paid on or off the base, per kilogram of cold weight. */
export function GridTable({ conformations, rows }: Pick<PriceGrid, 'conformations' | 'rows'>) {
  return (
    <Table
      caption="On or off the base, per kg of cold weight, by fat class and conformation"
      rows={rows}
      rowKey={(row) => row.fatClass}
      columns={[
        { id: 'fat', title: 'Fat class', cell: (row) => row.fatClass },
        ...conformations.map((conformation, at) => ({
          id: conformation,
          title: conformation,
          align: 'end' as const,
          cell: (row: PriceGrid['rows'][number]) => signedRate(row.adjustments[at] ?? 0),
        })),
      ]}
    />
  );
}
