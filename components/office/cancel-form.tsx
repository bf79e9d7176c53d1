import type { Control } from 'react-hook-form';
import { Button } from '#components/ui/button.tsx';
import { FormFrame } from '#components/ui/form-frame.tsx';
import { FormText } from '#components/ui/form-text.tsx';
import { Text } from '#components/ui/text.tsx';
import type { OrderSummary } from '#shared/contracts/orders.ts';
import { formatMoney } from '#shared/domain/words.ts';

type CancelFormProps = {
  order: OrderSummary;
  control: Control<{ reason: string }>;
  busy: boolean;
  onSubmit: () => void;
};

/** Cancelling gives the money back and frees the boxes; the reason goes into the mail. */
export function CancelForm({ order, control, busy, onSubmit }: CancelFormProps) {
  return (
    <FormFrame name="Cancel the order" onSubmit={onSubmit}>
      <Text>
        {`${order.name} is told by e-mail${order.paymentState === 'unpaid' ? '' : ` and gets back what was paid, up to ${formatMoney(order.totalPence)}`}. What was ordered is free again.`}
      </Text>
      <FormText control={control} name="reason" label="Reason" hint="It is written to the customer." />
      <Button kind="danger" label="Cancel the order" wide busy={busy} busyLabel="Cancelling …" onPress={onSubmit} />
    </FormFrame>
  );
}
