import { Button } from '#components/ui/button.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { Sheet } from '#components/ui/sheet.tsx';
import { Text } from '#components/ui/text.tsx';
import type { HitOrder } from '#shared/contracts/shortfalls.ts';
import { formatMoney } from '#shared/domain/words.ts';

/** What is about to be done for one order; `offerId` names the box that goes in instead. */
export type Settlement = { order: HitOrder; offerId: string | null };

type SettleSheetProps = {
  settlement: Settlement | undefined;
  busy: boolean;
  error: Error | null;
  onSettle: () => void;
  onClose: () => void;
};

/** Money moves and a customer is written to: asked once more before it is done. */
export function SettleSheet({ settlement, busy, error, onSettle, onClose }: SettleSheetProps) {
  return (
    <Sheet
      open={settlement !== undefined}
      onClose={onClose}
      title={settlement ? `Settle order ${settlement.order.orderNo}?` : ''}
      actions={
        <>
          <Button
            kind={settlement?.offerId ? 'primary' : 'danger'}
            label={settlement?.offerId ? 'Swap and write to them' : 'Refund and write to them'}
            busy={busy}
            busyLabel="Settling …"
            onPress={onSettle}
          />
          <Button kind="quiet" label="Not yet" onPress={onClose} />
        </>
      }
    >
      {settlement ? <Text>{sayWhat(settlement)}</Text> : null}
      <ProblemNotice error={error} title="Nothing was settled." />
    </Sheet>
  );
}

function sayWhat({ order, offerId }: Settlement): string {
  const told = `${order.name} is told by e-mail.`;
  const box = order.swaps.find((swap) => swap.offerId === offerId);
  if (box) return `${order.quantity} × ${box.name} goes in instead, at the price that was paid. ${told}`;
  if (order.isWholeOrder) {
    return `Nothing else is in this order: it is cancelled, and what was paid, up to ${formatMoney(order.refundPence)}, goes back. ${told}`;
  }
  return `${formatMoney(order.refundPence)} goes back; the rest of the order stays. ${told}`;
}
