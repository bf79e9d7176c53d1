import { View } from 'react-native';
import type { Order } from '#shared/contracts/orders.ts';
import { formatMoney, formatTime } from '#shared/domain/words.ts';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { Text } from '#components/ui/text.tsx';

type MoreForOrderProps = { order: Order; onLeave: () => void; isLeaving: boolean };

/** More for the order: the way to it, or what waits to be paid. */
export function MoreForOrder({ order, onLeave, isLeaving }: MoreForOrderProps) {
  const { addition } = order;
  if (addition) {
    return (
      <Notice
        kind="held"
        title={`${addition.words}: waiting for ${formatMoney(addition.amountPence)}.`}
        kept={`It is held for you until ${formatTime(addition.expiresAt)} and joins your order once it is paid. Your order itself stays as it is.`}
      >
        <ButtonLink outside small href={addition.paymentUrl} label="Go on paying" icon="forward" />
        <Button kind="quiet" small label="Give it up" busy={isLeaving} onPress={onLeave} />
      </Notice>
    );
  }
  return (
    <View style={css('w-section')}>
      <Heading level={2}>Something more?</Heading>
      <Text tone="quiet">Boxes and cuts of the same day can join this order; you pay the difference only.</Text>
      <View style={css('w-buttons')}>
        <ButtonLink kind="quiet" href={`/orders/${order.token}/add`} label="Add to this order" />
      </View>
    </View>
  );
}
