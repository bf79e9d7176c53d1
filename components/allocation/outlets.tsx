import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Table } from '#components/ui/table.tsx';
import type { Allocation } from '#shared/contracts/allocation.ts';
import { formatCount, formatWeight } from '#shared/domain/words.ts';
import { boxesOnSale, nameTradeLine } from './plan-words.ts';

/** What leaves beside the boxes: loose packs and the butchers' lines. */
export function Outlets({ loose, trade }: Pick<Allocation, 'loose' | 'trade'>) {
  return (
    <View style={css('w-columns')}>
      <Table
        caption="Loose packs"
        captionShown
        rows={loose.filter((row) => row.packs + row.sold + row.held > 0)}
        rowKey={(row) => row.cutId}
        empty="No loose packs in this plan."
        columns={[
          { id: 'name', title: 'Cut', cell: (row) => row.name },
          { id: 'packs', title: 'Packs', align: 'end', cell: (row) => row.packs },
          { id: 'grams', title: 'Weight', align: 'end', cell: (row) => formatWeight(row.grams) },
          { id: 'sold', title: 'Sold, held', align: 'end', cell: (row) => `${row.sold}, ${row.held}` },
        ]}
      />
      <Table
        caption="To butchers"
        captionShown
        rows={trade}
        rowKey={(row) => `${row.reservationNo} ${row.name}`}
        empty="Nothing is reserved by a butcher."
        columns={[
          { id: 'name', title: 'Line', cell: nameTradeLine },
          { id: 'to', title: 'To', cell: (row) => `${row.businessName}, no. ${row.reservationNo}` },
          { id: 'grams', title: 'Weight', align: 'end', cell: (row) => formatWeight(row.grams) },
        ]}
      />
    </View>
  );
}

/** `61 boxes and 20 loose packs`, as they go on sale. */
export function describeOutlets(plan: Pick<Allocation, 'boxes' | 'loose'>): string {
  const packs = plan.loose.reduce((sum, row) => sum + (row.promised ?? row.packs), 0);
  return `${formatCount(boxesOnSale(plan), 'box', 'boxes')} and ${formatCount(packs, 'loose pack')}`;
}
