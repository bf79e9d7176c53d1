import { View } from 'react-native';
import type { Order } from '#shared/contracts/orders.ts';
import { css } from '#components/theme/css.ts';
import { Heading } from '#components/ui/heading.tsx';
import { Table } from '#components/ui/table.tsx';
import { Text } from '#components/ui/text.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import { Weight } from '#components/ui/weight.tsx';

/** The real packs with their weights; each code leads to the animal. */
export function OrderPacks({ packs }: Pick<Order, 'packs'>) {
  if (packs.length === 0) return null;
  return (
    <View style={css('w-section')}>
      <Heading level={2}>Your packs</Heading>
      <Text tone="quiet">The code on each label leads to the animal that it came from.</Text>
      <Table
        caption="Packs of this order"
        rowKey={(pack) => pack.code}
        rows={packs}
        columns={[
          { id: 'cut', title: 'Cut', cell: (pack) => pack.cut },
          { id: 'in', title: 'In', cell: (pack) => pack.box || 'by itself' },
          { id: 'weight', title: 'Weight', align: 'end', cell: (pack) => <Weight grams={pack.grams} /> },
          {
            id: 'code',
            title: 'Code',
            align: 'end',
            cell: (pack) => <TextLink href={`/trace/${encodeURIComponent(pack.code)}`}>{pack.code}</TextLink>,
          },
        ]}
      />
    </View>
  );
}
