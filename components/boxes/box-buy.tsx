import { View } from 'react-native';
import type { Box } from '#shared/contracts/shop.ts';
import { formatDay, formatDayTime, formatRate } from '#shared/domain/words.ts';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { DayChoice } from '#components/ui/day-choice.tsx';
import { Money } from '#components/ui/money.tsx';
import { Stepper } from '#components/ui/stepper.tsx';
import { Stock } from '#components/ui/stock.tsx';
import { Text } from '#components/ui/text.tsx';

type BoxBuyProps = {
  box: Box;
  dayId: string | undefined;
  onDay: (dayId: string) => void;
  /** How many of this box are in the basket. */
  quantity: number;
  onQuantity: (quantity: number) => void;
  /** The day of a basket that already holds something, when it is another one. */
  movesFrom?: string | undefined;
};

/** Price, what is left, the day, and the one red button. */
export function BoxBuy({ box, dayId, onDay, quantity, onQuantity, movesFrom }: BoxBuyProps) {
  const open = box.days.filter((day) => day.isInTime);
  const day = box.days.find((one) => one.id === dayId);
  const offer = box.offers.find((one) => one.dayId === dayId);
  const free = offer?.free ?? 0;
  return (
    <View style={css('w-buy')}>
      <View style={css('w-buy-price')}>
        <Money pence={box.pricePence} look="price-large" />
        <Text tone="quiet" figures nowrap>
          {formatRate(box.tenthPencePerKg)}
        </Text>
        <View style={css('w-buy-end')}>
          <Stock free={free} held={offer?.held ?? 0} open={day?.isInTime ?? false} />
        </View>
      </View>
      <DayChoice
        days={open.map((one) => ({ id: one.id, day: one.day, note: noteOf(box, one.id) }))}
        value={dayId}
        onChange={onDay}
      />
      <BuyButton box={box} free={free} quantity={quantity} onQuantity={onQuantity} />
      {movesFrom && day && quantity === 0 ? (
        <Text size="small" tone="quiet">
          {`Your basket is for ${formatDay(movesFrom)}. Adding this box moves all of it to ${formatDay(day.day)}.`}
        </Text>
      ) : null}
      {day?.isInTime ? (
        <Text tone="quiet">
          {`Collect ${day.collectionDays.map(formatDay).join(' or ')}. Change or cancel until ${formatDayTime(day.cutOffAt)}.`}
        </Text>
      ) : null}
    </View>
  );
}

function noteOf(box: Box, dayId: string): string {
  const free = box.offers.find((offer) => offer.dayId === dayId)?.free ?? 0;
  return free > 0 ? `${free} left` : 'sold out';
}

type BuyButtonProps = Pick<BoxBuyProps, 'box' | 'quantity' | 'onQuantity'> & { free: number };

function BuyButton({ box, free, quantity, onQuantity }: BuyButtonProps) {
  if (quantity === 0) {
    return (
      <Button
        wide
        label={free > 0 ? 'Add to basket' : 'Sold out'}
        disabled={free === 0}
        onPress={() => onQuantity(1)}
      />
    );
  }
  return (
    <View style={css('w-buy')}>
      <View style={css('w-buy-count')}>
        <Text weight="strong" live="status">{`${quantity} in your basket`}</Text>
        <Stepper label={box.name} value={quantity} max={Math.max(free, quantity)} onChange={onQuantity} />
      </View>
      <ButtonLink wide href="/basket" label="Go to basket" icon="forward" />
    </View>
  );
}
