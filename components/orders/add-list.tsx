import { View } from 'react-native';
import { formatMoney } from '#shared/domain/words.ts';
import { css } from '#components/theme/css.ts';
import { Heading } from '#components/ui/heading.tsx';
import { Money } from '#components/ui/money.tsx';
import { Stepper } from '#components/ui/stepper.tsx';
import { Text } from '#components/ui/text.tsx';

/** Something of the order's own cutting day that can be added. */
export type Addable = { offerId: string; name: string; note: string; pricePence: number; free: number };

type AddListProps = {
  title: string;
  items: readonly Addable[];
  quantityOf: (offerId: string) => number;
  onQuantity: (offerId: string, quantity: number) => void;
};

/** What is free, with its price and how many to add. */
export function AddList({ title, items, quantityOf, onQuantity }: AddListProps) {
  if (items.length === 0) return null;
  return (
    <View style={css('w-section')}>
      <Heading level={2}>{title}</Heading>
      <View role="list" style={css('w-rows-plain')}>
        {items.map((item) => (
          <View key={item.offerId} role="listitem" style={css('w-item')}>
            <View style={css('w-item-words')}>
              <Text weight="bold" size="lead">
                {item.name}
              </Text>
              <Text size="small" tone="quiet">
                {`${item.note} · ${formatMoney(item.pricePence)} · ${item.free} left`}
              </Text>
            </View>
            <View style={css('w-item-price')}>
              {quantityOf(item.offerId) > 0 ? (
                <Money pence={quantityOf(item.offerId) * item.pricePence} look="price" />
              ) : null}
            </View>
            <View style={css('w-item-do')}>
              <Stepper
                label={item.name}
                value={quantityOf(item.offerId)}
                max={item.free}
                onChange={(quantity) => onQuantity(item.offerId, quantity)}
              />
            </View>
          </View>
        ))}
      </View>
    </View>
  );
}
