import { View } from 'react-native';
import type { LooseCut } from '#shared/contracts/shop.ts';
import { formatMoney, formatRate, formatWeight } from '#shared/domain/words.ts';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { CutDrawing } from '#components/ui/cut-drawing.tsx';
import { Figure } from '#components/ui/figure.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { Stepper } from '#components/ui/stepper.tsx';
import { Stock } from '#components/ui/stock.tsx';
import { Text } from '#components/ui/text.tsx';

type CutRowProps = {
  cut: LooseCut;
  dayId: string | undefined;
  open: boolean;
  quantity: number;
  onQuantity: (quantity: number) => void;
};

/** One cut: the price of a kilogram large, the most that a pack can weigh and cost, and what is left. */
export function CutRow({ cut, dayId, open, quantity, onQuantity }: CutRowProps) {
  const offer = cut.offers.find((one) => one.dayId === dayId);
  const free = offer?.free ?? 0;
  return (
    <View role="listitem" style={css('w-cut')}>
      <CutDrawing kind={cut.cooking} size={60} />
      <Heading level={2} look="item">
        {cut.name}
      </Heading>
      <View style={css('w-cut-price')}>
        <Figure>{formatRate(cut.tenthPencePerKg)}</Figure>
        <Text size="small" tone="quiet" align="end" figures>
          {`up to ${formatWeight(cut.upperGrams)}: ${formatMoney(cut.pricePence)}`}
        </Text>
      </View>
      <View style={css('w-cut-words')}>
        <Text size="small" tone="quiet">
          {cut.description}
        </Text>
      </View>
      <View style={css('w-cut-buy')}>
        <Stock free={free} held={offer?.held ?? 0} open={open} />
        {quantity > 0 ? (
          <Stepper label={`${cut.name}, packs`} value={quantity} max={Math.max(free, quantity)} onChange={onQuantity} />
        ) : free > 0 && open ? (
          <Button
            kind="quiet"
            small
            label="Add a pack"
            name={`Add a pack: ${cut.name}`}
            onPress={() => onQuantity(1)}
          />
        ) : null}
      </View>
    </View>
  );
}
