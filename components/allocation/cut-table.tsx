import { Table, type Column } from '#components/ui/table.tsx';
import type { Allocation } from '#shared/contracts/allocation.ts';
import { formatRate, formatWeight } from '#shared/domain/words.ts';

type CutRow = Allocation['cuts'][number];
type GramsKey = 'madeGrams' | 'stockUsedGrams' | 'boxGrams' | 'looseGrams' | 'tradeGrams' | 'mincedGrams' | 'leftGrams';

const weighed: readonly { id: GramsKey; title: string }[] = [
  { id: 'madeGrams', title: 'In' },
  { id: 'stockUsedGrams', title: 'From the freezer' },
  { id: 'boxGrams', title: 'Boxes' },
  { id: 'looseGrams', title: 'Loose' },
  { id: 'tradeGrams', title: 'Trade' },
  { id: 'mincedGrams', title: 'Minced' },
  { id: 'leftGrams', title: 'Over' },
];

/** Each cut that the day makes: kilograms in, where they go, what is left, and what one more would be worth. */
export function CutTable({ cuts }: { cuts: readonly CutRow[] }) {
  const moved = cuts.filter((cut) => weighed.some(({ id }) => cut[id] !== 0));
  // A farm whose freezer is empty has no use for the column.
  const shown = weighed.filter(({ id }) => id !== 'stockUsedGrams' || cuts.some((cut) => cut.stockGrams > 0));
  const sum = (id: GramsKey) => cuts.reduce((total, cut) => total + cut[id], 0);
  const columns: Column<CutRow>[] = [
    { id: 'name', title: 'Cut', cell: (cut) => cut.name, foot: 'All cuts' },
    ...shown.map(({ id, title }) => ({
      id,
      title,
      align: 'end' as const,
      cell: (cut: CutRow) => (cut[id] === 0 ? '–' : formatWeight(cut[id])),
      foot: formatWeight(sum(id)),
    })),
    {
      id: 'worth',
      title: 'One more kg',
      align: 'end',
      cell: (cut) => (cut.worthPencePerKg === null ? '–' : formatRate(cut.worthPencePerKg * 10)),
      foot: '',
    },
  ];
  return (
    <Table
      caption="Kilograms of each cut: in, out and over"
      rows={moved}
      rowKey={(cut) => cut.cutId}
      columns={columns}
    />
  );
}
