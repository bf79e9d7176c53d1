import { View } from 'react-native';
import type { PricedLine } from '#shared/contracts/orders.ts';
import { formatDay, formatWeight } from '#shared/domain/words.ts';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { IconButton } from '#components/ui/icon-button.tsx';
import { Money } from '#components/ui/money.tsx';
import { Stepper } from '#components/ui/stepper.tsx';
import { Text } from '#components/ui/text.tsx';

type BasketItemRowProps = {
  name: string;
  quantity: number;
  /** As the farm counts it now; the day may not offer it at all. */
  line: PricedLine | undefined;
  /** Another day that has enough of it. */
  elsewhere: { id: string; day: string; free: number } | undefined;
  onQuantity: (quantity: number) => void;
  onDay: (dayId: string) => void;
};

/** One thing in the basket; says when less of it is left than wanted, and what can be had instead. */
export function BasketItemRow({ name, quantity, line, elsewhere, onQuantity, onDay }: BasketItemRowProps) {
  const isShort = line === undefined || line.free < quantity;
  const most = Math.max(line?.free ?? quantity, 1);
  return (
    <View role="listitem" style={css('w-item')}>
      <View style={css('w-item-words')}>
        <Text weight="bold" size="lead">
          {name}
        </Text>
        {line ? (
          <Text size="small" tone="quiet">
            {line.kind === 'box'
              ? `At least ${formatWeight(line.unitGrams)} each`
              : `Packs of up to ${formatWeight(line.unitGrams)}; what they weigh less is paid back`}
          </Text>
        ) : null}
      </View>
      <View style={css('w-item-price')}>{line ? <Money pence={line.linePence} look="price" /> : null}</View>
      {isShort ? (
        <View style={css('w-item-news')}>
          <Text weight="strong" tone="waiting" live="status">
            {shortWords(name, line?.free ?? 0)}
          </Text>
        </View>
      ) : null}
      <View style={css('w-item-do')}>
        <Stepper label={name} value={quantity} min={1} max={Math.max(most, quantity)} onChange={onQuantity} />
        {line && line.free > 0 && line.free < quantity ? (
          <Button kind="quiet" small label={`Take ${line.free}`} onPress={() => onQuantity(line.free)} />
        ) : null}
        {isShort && elsewhere ? (
          <Button
            kind="quiet"
            small
            label={`Move the basket to ${formatDay(elsewhere.day)}`}
            name={`Move the basket to ${formatDay(elsewhere.day)}: ${name}, ${elsewhere.free} left`}
            onPress={() => onDay(elsewhere.id)}
          />
        ) : null}
      </View>
      <View style={css('w-item-end')}>
        <IconButton icon="close" name={`Take out: ${name}`} onPress={() => onQuantity(0)} />
      </View>
    </View>
  );
}

function shortWords(name: string, free: number): string {
  if (free === 0) return `${name} is gone for this day.`;
  return free === 1 ? 'Only one is left for this day.' : `Only ${free} are left for this day.`;
}
