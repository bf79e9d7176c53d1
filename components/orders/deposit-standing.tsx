import type { Order } from '#shared/contracts/orders.ts';
import { formatMoney } from '#shared/domain/words.ts';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { Text } from '#components/ui/text.tsx';

/** How the rest of a deposit order stands, and the way to pay it where the card refused. */
export function DepositStanding({ order: { deposit, token } }: { order: Order }) {
  if (!deposit || deposit.rest === 'paid') return null;
  const rest = formatMoney(deposit.restPence);
  if (deposit.rest === 'failed') {
    return (
      <Notice
        kind="held"
        title={`${rest} is still to be paid.`}
        kept="The card that paid the deposit refused it, or its bank wants to ask you. Your order stays packed."
      >
        {/* A page of its own: only there does the payment company's script run. */}
        <ButtonLink outside small href={`/orders/${token}/pay`} label={`Pay ${rest}`} icon="forward" />
      </Notice>
    );
  }
  return (
    <Text tone="quiet" measure>
      {deposit.rest === 'later'
        ? `${formatMoney(deposit.depositPence)} is paid. The rest, at most ${rest}, is taken from the same card once your order is packed and weighed.`
        : `The rest of ${rest} is being taken from the same card.`}
    </Text>
  );
}
