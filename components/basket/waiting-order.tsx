import type { Order } from '#shared/contracts/orders.ts';
import { formatMoney } from '#shared/domain/words.ts';
import { Button } from '#components/ui/button.tsx';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { Notice } from '#components/ui/notice.tsx';

type WaitingOrderProps = { order: Order; onLeave: () => void; isLeaving: boolean };

/** An order of this basket waits on the payment page, and holds its stock there. */
export function WaitingOrder({ order, onLeave, isLeaving }: WaitingOrderProps) {
  return (
    <Notice
      kind="held"
      title={`Order ${order.orderNo} is waiting for its payment of ${formatMoney(order.totalPence)}.`}
      kept="What is in it is held for you meanwhile."
      next="Go on paying, or give it up to change the basket."
    >
      <ButtonLink kind="quiet" small href={`/orders/${order.token}`} label="See the order" />
      <Button kind="quiet" small label="Change the basket" busy={isLeaving} onPress={onLeave} />
    </Notice>
  );
}
