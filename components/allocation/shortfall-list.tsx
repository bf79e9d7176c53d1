import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { Text } from '#components/ui/text.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import type { HitOrder, ShortProduct } from '#shared/contracts/shortfalls.ts';
import { formatCount, formatDay, formatMoney } from '#shared/domain/words.ts';

export type ShortfallActs = {
  onRefund: (order: HitOrder) => void;
  onSwap: (order: HitOrder, offerId: string) => void;
  busy: boolean;
};

/** What is sold beyond what the beef gives, whose orders are hit, and how each may be settled. Nothing happens by itself. */
export function ShortfallList({ products, ...acts }: { products: readonly ShortProduct[] } & ShortfallActs) {
  return (
    <View style={css('w-stack-l')}>
      {products.map((product) => (
        <View key={`${product.dayId} ${product.name}`} style={css('w-stack-s')}>
          <Heading level={3}>{`${product.name}, ${formatDay(product.day)}`}</Heading>
          <Text figures>{shortWords(product)}</Text>
          <TextLink href={`/office/cutting-days/${product.dayId}/allocation`} place="alone">
            {`Allocation of ${formatDay(product.day)}`}
          </TextLink>
          <View role="list" style={css('w-rows')}>
            {product.orders.map((order) => (
              <Hit key={order.lineId} order={order} product={product} {...acts} />
            ))}
          </View>
        </View>
      ))}
    </View>
  );
}

/** `12 boxes sold or held, the newest plan makes 10: 2 boxes short.` */
export function shortWords({ unit, taken, made }: Pick<ShortProduct, 'unit' | 'taken' | 'made'>): string {
  return `${countOf(taken, unit)} sold or held, the newest plan makes ${made}: ${countOf(taken - made, unit)} short.`;
}

function countOf(count: number, unit: ShortProduct['unit']): string {
  return unit === 'boxes' ? formatCount(count, 'box', 'boxes') : formatCount(count, 'pack');
}

function Hit({ order, product, onRefund, onSwap, busy }: ShortfallActs & { order: HitOrder; product: ShortProduct }) {
  const part = `${order.quantity} × ${product.name}`;
  return (
    <View role="listitem" style={css('w-stack-s')}>
      <Text weight="strong" figures>{`Order ${order.orderNo}, ${order.name}: ${part}`}</Text>
      {order.blocked ? <Text tone="quiet">{order.blocked}</Text> : null}
      <View style={css('w-row')}>
        {order.blocked
          ? null
          : order.swaps.map((swap) => (
              <Button
                key={swap.offerId}
                kind="quiet"
                small
                busy={busy}
                label={`Swap for ${swap.name}`}
                name={`Swap for ${swap.name} in order ${order.orderNo}`}
                onPress={() => onSwap(order, swap.offerId)}
              />
            ))}
        {order.blocked ? null : (
          <Button
            kind="danger"
            small
            busy={busy}
            label={refundLabel(order)}
            name={`${refundLabel(order)}, order ${order.orderNo}`}
            onPress={() => onRefund(order)}
          />
        )}
        <TextLink href="/office/orders" place="alone">
          Orders
        </TextLink>
      </View>
    </View>
  );
}

function refundLabel({ isWholeOrder, refundPence }: HitOrder): string {
  return isWholeOrder
    ? `Cancel and refund, up to ${formatMoney(refundPence)}`
    : `Refund ${formatMoney(refundPence)}, keep the rest`;
}
