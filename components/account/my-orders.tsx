import type { ReactNode } from 'react';
import { View } from 'react-native';
import type { OrderSummary } from '#shared/contracts/orders.ts';
import type { OrderState } from '#shared/domain/order-state.ts';
import { formatDayTime } from '#shared/domain/words.ts';
import { css } from '#components/theme/css.ts';
import { Badge } from '#components/ui/badge.tsx';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { Money } from '#components/ui/money.tsx';
import { Text } from '#components/ui/text.tsx';
import { TextLink } from '#components/ui/text-link.tsx';

const kinds = {
  'awaiting payment': 'held',
  confirmed: 'free',
  packed: 'free',
  ready: 'free',
  collected: 'sold',
  delivered: 'sold',
  cancelled: 'quiet',
  missed: 'held',
} as const satisfies Record<OrderState, string>;

type MyOrdersProps = {
  orders: readonly OrderSummary[];
  /** What can be done with an order that was paid. */
  again: (order: OrderSummary) => ReactNode;
};

/** The orders of one person, the latest first. */
export function MyOrders({ orders, again }: MyOrdersProps) {
  if (orders.length === 0) {
    return (
      <EmptyState title="No orders yet" words="Orders that you place while you are signed in are listed here.">
        <ButtonLink href="/" label="See the boxes" />
      </EmptyState>
    );
  }
  return (
    <View role="list" style={css('w-rows-plain')}>
      {[...orders].reverse().map((order) => (
        <View role="listitem" key={order.id} style={css('w-item')}>
          <View style={css('w-item-words')}>
            <TextLink href={`/orders/${order.token}`} place="alone" name={`Order ${order.orderNo}`}>
              {`Order ${order.orderNo}`}
            </TextLink>
            <Text>{order.lines.join(', ')}</Text>
            <Text size="small" tone="quiet">{`${formatDayTime(order.startsAt)}, ${order.pointName}`}</Text>
            {order.paymentState === 'unpaid' ? null : again(order)}
          </View>
          <View style={css('w-item-price', 'w-stack-s')}>
            <Money pence={order.totalPence} look="price" />
            <Badge kind={kinds[order.state]}>{capitalised(order.state)}</Badge>
          </View>
        </View>
      ))}
    </View>
  );
}

function capitalised(state: string): string {
  return state.charAt(0).toUpperCase() + state.slice(1);
}
