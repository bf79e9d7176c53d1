import { Badge } from '#components/ui/badge.tsx';
import { Button } from '#components/ui/button.tsx';
import { Money } from '#components/ui/money.tsx';
import { Table } from '#components/ui/table.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import type { OrderSummary } from '#shared/contracts/orders.ts';
import { canMoveOrder } from '#shared/domain/order-state.ts';
import { formatDay, formatDayTime } from '#shared/domain/words.ts';

const kinds: Record<OrderSummary['state'], 'free' | 'held' | 'sold' | 'quiet'> = {
  'awaiting payment': 'held',
  confirmed: 'free',
  packed: 'free',
  ready: 'free',
  collected: 'sold',
  delivered: 'sold',
  missed: 'held',
  cancelled: 'quiet',
};

type OrderTableProps = { orders: readonly OrderSummary[]; onCancel: (order: OrderSummary) => void };

export function OrderTable({ orders, onCancel }: OrderTableProps) {
  return (
    <Table
      caption="Orders"
      rows={orders}
      rowKey={(order) => order.id}
      empty="No order fits what you look for."
      columns={[
        {
          id: 'no',
          title: 'Order',
          cell: (order) => (
            <TextLink href={`/orders/${order.token}`} name={`${order.orderNo} of ${order.name}`}>
              {String(order.orderNo)}
            </TextLink>
          ),
        },
        { id: 'name', title: 'Name', cell: (order) => order.name },
        { id: 'day', title: 'Cutting day', cell: (order) => formatDay(order.day) },
        { id: 'lines', title: 'Ordered', cell: (order) => order.lines.join(', ') },
        { id: 'collect', title: 'Collects', cell: (order) => `${order.pointName}, ${formatDayTime(order.startsAt)}` },
        { id: 'state', title: 'State', cell: (order) => <Badge kind={kinds[order.state]}>{order.state}</Badge> },
        { id: 'payment', title: 'Payment', cell: (order) => order.paymentState },
        { id: 'total', title: 'Total', align: 'end', cell: (order) => <Money pence={order.totalPence} /> },
        {
          id: 'cancel',
          title: 'Cancel',
          cell: (order) =>
            canMoveOrder(order.state, 'cancelled') ? (
              <Button
                kind="quiet"
                small
                label="Cancel"
                name={`Cancel order ${order.orderNo} of ${order.name}`}
                onPress={() => onCancel(order)}
              />
            ) : (
              '–'
            ),
        },
      ]}
    />
  );
}
