import { useState } from 'react';
import { View } from 'react-native';
import type { Order } from '#shared/contracts/orders.ts';
import { formatDayTime, formatMoney } from '#shared/domain/words.ts';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { Sheet } from '#components/ui/sheet.tsx';
import { Text } from '#components/ui/text.tsx';

/** Of a deposit order the rest has not been taken yet. */
function paidPence({ totalPence, deposit }: Order): number {
  return deposit?.rest === 'later' ? totalPence - deposit.restPence : totalPence;
}

type CancelOrderProps = {
  order: Order;
  onCancel: () => void;
  isCancelling: boolean;
  /** The farm's refusal, such as a cut-off that passed meanwhile. */
  refusal: string | undefined;
};

/** Cancelling until the cut-off, asked once more before it is done. */
export function CancelOrder({ order, onCancel, isCancelling, refusal }: CancelOrderProps) {
  const [isAsking, setIsAsking] = useState(false);
  return (
    <View style={css('w-section')}>
      <Heading level={2}>Plans change</Heading>
      <Text tone="quiet" measure>
        {`Until ${formatDayTime(order.cutOffAt)} you can cancel here and get all of your money back. After that the meat is cut for you.`}
      </Text>
      {refusal ? <Notice kind="error" title={refusal} /> : null}
      <View style={css('w-buttons')}>
        <Button kind="danger" label="Cancel the order" onPress={() => setIsAsking(true)} />
      </View>
      <Sheet
        open={isAsking}
        onClose={() => setIsAsking(false)}
        title={`Cancel order ${order.orderNo}?`}
        actions={
          <>
            <Button
              kind="danger"
              label="Yes, cancel it"
              busy={isCancelling}
              busyLabel="Cancelling …"
              onPress={() => {
                onCancel();
                setIsAsking(false);
              }}
            />
            <Button kind="quiet" label="Keep the order" onPress={() => setIsAsking(false)} />
          </>
        }
      >
        <Text>{`${formatMoney(paidPence(order))} goes back to the card that paid, and what was kept for you goes back on the counter.`}</Text>
      </Sheet>
    </View>
  );
}
