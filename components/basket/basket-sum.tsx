import { View } from 'react-native';
import type { CuttingDaySummary } from '#shared/contracts/shop.ts';
import { formatDay, formatDayTime } from '#shared/domain/words.ts';
import { css } from '#components/theme/css.ts';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { Money } from '#components/ui/money.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { Text } from '#components/ui/text.tsx';

type BasketSumProps = { day: CuttingDaySummary; totalPence: number; isRight: boolean };

/** What it comes to, until when it can be changed, and the way to the checkout. */
export function BasketSum({ day, totalPence, isRight }: BasketSumProps) {
  return (
    <View style={css('w-section')}>
      <View style={css('w-total')}>
        <Text weight="bold" size="lead">
          Total
        </Text>
        <Money pence={totalPence} look="price-large" />
      </View>
      {isRight ? (
        <ButtonLink wide href="/checkout" label="Checkout" icon="forward" />
      ) : (
        <Notice
          kind="held"
          title="Somebody was quicker."
          kept="Your basket is as you left it."
          next="Put right what is marked above, then go on to the checkout."
        />
      )}
      <Text tone="quiet">
        {`Collect ${day.collectionDays.map(formatDay).join(' or ')}; you choose place and time next. Change or cancel until ${formatDayTime(day.cutOffAt)}.`}
      </Text>
    </View>
  );
}
