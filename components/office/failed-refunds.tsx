import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { Notice } from '#components/ui/notice.tsx';
import type { FailedRefund } from '#shared/contracts/orders.ts';
import { formatMoney } from '#shared/domain/words.ts';

type FailedRefundsProps = {
  refunds: readonly FailedRefund[];
  onRetry: (refund: FailedRefund) => void;
  retryingId: string | undefined;
};

/** Money that is owed and did not go out; nothing is drawn without any. */
export function FailedRefunds({ refunds, onRetry, retryingId }: FailedRefundsProps) {
  if (refunds.length === 0) return null;
  return (
    <View style={css('w-stack')}>
      {refunds.map((refund) => (
        <Notice
          key={refund.paymentId}
          kind="held"
          title={`${formatMoney(refund.amountPence)} to ${refund.name}, order ${refund.orderNo}, did not go out.`}
          kept={`${refund.error ?? 'The payment company gave no reason.'} It was for: ${refund.reason}.`}
        >
          <Button
            kind="quiet"
            small
            label="Try again"
            name={`Try again: refund of order ${refund.orderNo}`}
            busy={retryingId === refund.paymentId}
            onPress={() => onRetry(refund)}
          />
        </Notice>
      ))}
    </View>
  );
}
