import { View } from 'react-native';
import type { Order } from '#shared/contracts/orders.ts';
import { formatMoney, formatWeight } from '#shared/domain/words.ts';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { DefinitionList } from '#components/ui/definition-list.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { Text } from '#components/ui/text.tsx';

type OrderLinesProps = { order: Order; onSwap: (line: Order['lines'][number]) => void };

/** What was ordered and what it came to, less what was paid back. */
export function OrderLines({ order, onSwap }: OrderLinesProps) {
  const { lines, totalPence, refundedPence, paymentState, discountPence, deliveryPence } = order;
  const isPaid = paymentState !== 'unpaid' && paymentState !== 'part paid';
  return (
    <View style={css('w-section')}>
      <Heading level={2}>What you ordered</Heading>
      <DefinitionList
        ruled
        items={[
          ...lines.map((line) => ({
            term: `${line.quantity} × ${line.name}`,
            note: `${line.kind === 'box' ? 'at least' : 'up to'} ${formatWeight(line.unitGrams)}${line.quantity > 1 ? ' each' : ''}`,
            value: formatMoney(line.linePence),
          })),
          ...(discountPence > 0
            ? [{ term: order.promoCode ? `Code ${order.promoCode}` : 'Taken off', value: formatMoney(-discountPence) }]
            : []),
          ...(order.isDelivered ? [{ term: 'Delivery', value: formatMoney(deliveryPence) }] : []),
          { term: isPaid ? 'Paid' : 'Total', value: formatMoney(totalPence), strong: true },
          ...(refundedPence > 0 ? [{ term: 'Paid back', value: formatMoney(-refundedPence) }] : []),
        ]}
      />
      <View style={css('w-buttons')}>
        {lines
          .filter((line) => line.swaps.length > 0)
          .map((line) => (
            <Button key={line.id} kind="quiet" small label={`Swap ${line.name}`} onPress={() => onSwap(line)} />
          ))}
      </View>
      {order.note ? <Text tone="quiet">{`Your note for the packer: ${order.note}`}</Text> : null}
    </View>
  );
}
