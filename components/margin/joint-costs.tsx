import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Disclosure } from '#components/ui/disclosure.tsx';
import { Table } from '#components/ui/table.tsx';
import { Text } from '#components/ui/text.tsx';
import type { DayMargin } from '#shared/contracts/margin.ts';
import { formatMoney } from '#shared/domain/words.ts';

/** What each kind of box has to bring, and what it carries of the carcases. */
export function BoxPriceTable({ boxes, cardFee }: Pick<DayMargin, 'boxes' | 'cardFee'>) {
  return (
    <View style={css('w-stack')}>
      <Table
        caption="Prices at which a box just pays, and at which selling deadweight would have been better"
        rows={boxes}
        rowKey={({ boxKindId }) => boxKindId}
        empty="No boxes here."
        columns={[
          { id: 'name', title: 'Box', cell: ({ name }) => name },
          { id: 'boxes', title: 'Boxes', align: 'end', cell: ({ boxes: count }) => count },
          { id: 'price', title: 'Price', align: 'end', cell: ({ pricePence }) => formatMoney(pricePence) },
          { id: 'even', title: 'Breaks even at', align: 'end', cell: (row) => formatMoney(row.breakEvenPence) },
          {
            id: 'deadweight',
            title: 'Deadweight better below',
            align: 'end',
            cell: ({ deadweightPricePence }) =>
              deadweightPricePence === null
                ? 'none'
                : deadweightPricePence === 0
                  ? 'at no price'
                  : formatMoney(deadweightPricePence),
          },
        ]}
      />
      <Disclosure words="How these prices are reckoned">
        <View style={css('w-stack')}>
          <Text measure>
            {`A box breaks even where its share of the carcases and its packaging are just paid for after the card fee of ${
              cardFee.ratePpht / 1000
            } % and ${formatMoney(cardFee.fixedPence)}. Deadweight is better below the price at which the gain of the whole day is nought, everything else sold as it is.`}
          </Text>
          <Table
            caption="One box of each kind"
            captionShown
            rows={boxes}
            rowKey={({ boxKindId }) => boxKindId}
            columns={[
              { id: 'name', title: 'Box', cell: ({ name }) => name },
              {
                id: 'share',
                title: 'Share of the carcases',
                align: 'end',
                cell: (row) => formatMoney(row.jointSharePence),
              },
              { id: 'direct', title: 'Packaging', align: 'end', cell: (row) => formatMoney(row.directPence) },
            ]}
          />
        </View>
      </Disclosure>
    </View>
  );
}

/** The whole joint cost and who carries it. */
export function JointCostTable({ joint }: Pick<DayMargin, 'joint'>) {
  const sum = (of: (share: DayMargin['joint']['shares'][number]) => number) =>
    formatMoney(joint.shares.reduce((total, share) => total + of(share), 0));
  return (
    <View style={css('w-stack')}>
      <Text measure>
        {`Deadweight value, kill, inspection, levy, haulage and butchery together are ${formatMoney(
          joint.totalPence,
        )}. Each carcase’s part is shared among what came of it by net realisable value: what it sells for less what it still costs after the cut. A product that loses money after the cut carries nothing.`}
      </Text>
      <Table
        caption="Joint cost by product"
        rows={joint.shares}
        rowKey={({ id }) => id}
        columns={[
          { id: 'name', title: 'Product', cell: ({ name }) => name, foot: 'Together' },
          {
            id: 'value',
            title: 'Net realisable value',
            align: 'end',
            cell: (row) => formatMoney(row.netRealisablePence),
            foot: sum((row) => row.netRealisablePence),
          },
          {
            id: 'share',
            title: 'Share of the joint cost',
            align: 'end',
            cell: (row) => formatMoney(row.sharePence),
            foot: sum((row) => row.sharePence),
          },
          {
            id: 'margin',
            title: 'Left over',
            align: 'end',
            cell: (row) => formatMoney(row.marginPence),
            foot: sum((row) => row.marginPence),
          },
        ]}
      />
    </View>
  );
}
