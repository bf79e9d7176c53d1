import { View } from 'react-native';
import type { Feedback, FeedbackEdit } from '#shared/contracts/feedback.ts';
import { css } from '#components/theme/css.ts';
import { Heading } from '#components/ui/heading.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import { AgainButton, type Again } from './again-button.tsx';
import { FeedbackForm } from './feedback-form.tsx';

type OrderAfterProps = {
  orderNo: number;
  receiptHref: string;
  again: Again;
  feedback: {
    feedback: Feedback | undefined;
    give: (feedback: FeedbackEdit) => void;
    isSending: boolean;
    isSaved: boolean;
    error: string | undefined;
  };
};

/** What an order is still good for once it is paid: the receipt, the same again, a word to the farm. */
export function OrderAfter({ orderNo, receiptHref, again, feedback }: OrderAfterProps) {
  const { feedback: known, give, ...sending } = feedback;
  return (
    <>
      {known?.canGive ? (
        <FeedbackForm key={known.given?.changedAt ?? 'new'} given={known.given} onSend={give} {...sending} />
      ) : null}
      <View style={css('w-section')}>
        <Heading level={2}>For later</Heading>
        <TextLink href={receiptHref} place="alone" outside>
          Receipt (PDF)
        </TextLink>
        <AgainButton orderNo={orderNo} again={again} />
      </View>
    </>
  );
}
