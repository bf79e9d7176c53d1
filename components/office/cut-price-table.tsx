import { Table } from '#components/ui/table.tsx';
import type { Cut } from '#shared/contracts/office.ts';
import { formatRate, formatWeight } from '#shared/domain/words.ts';

/** The cuts as they are priced: what a loose pack costs, and what is still got for one that stays lying. */
export function CutPriceTable({ cuts }: { cuts: readonly Cut[] }) {
  return (
    <Table
      caption="Cuts"
      rows={cuts}
      rowKey={(cut) => cut.id}
      columns={[
        { id: 'name', title: 'Cut', cell: (cut) => cut.name },
        { id: 'cooking', title: 'For', cell: (cut) => cut.cooking },
        {
          id: 'pack',
          title: 'A pack',
          align: 'end',
          cell: (cut) => `${formatWeight(cut.minPackGrams)}–${formatWeight(cut.maxPackGrams)}`,
        },
        { id: 'price', title: 'Price', align: 'end', cell: (cut) => formatRate(cut.tenthPencePerKg) },
        {
          id: 'clearance',
          title: 'Left over, at',
          align: 'end',
          cell: (cut) => formatRate(cut.clearanceTenthPencePerKg),
        },
        {
          id: 'demand',
          title: 'Loose packs likely to sell',
          align: 'end',
          cell: (cut) => (cut.isSoldLoose ? cut.looseDemandPacks : 'not sold loose'),
        },
      ]}
    />
  );
}
