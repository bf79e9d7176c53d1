import { Link } from 'expo-router';
import { View } from 'react-native';
import type { BoxCard } from '#shared/contracts/shop.ts';
import { formatRate, formatWeight } from '#shared/domain/words.ts';
import { css } from '#components/theme/css.ts';
import { Heading } from '#components/ui/heading.tsx';
import { Icon } from '#components/ui/icon.tsx';
import { Money } from '#components/ui/money.tsx';
import { Stock } from '#components/ui/stock.tsx';
import { Text } from '#components/ui/text.tsx';

type BoxRowProps = {
  box: BoxCard;
  /** The cutting day whose stock is told. */
  day: { id: string; isInTime: boolean } | undefined;
};

/** A box as it stands in the list: name and price large, what is in it, what is left. The whole row is the link. */
export function BoxRow({ box, day }: BoxRowProps) {
  const offer = box.offers.find((one) => one.dayId === day?.id);
  return (
    <View style={css('w-good')}>
      <Heading level={3} look="section">
        {box.name}
      </Heading>
      <Money pence={box.pricePence} look="price" />
      <Text tone="quiet">{box.summary}</Text>
      <Text size="small" tone="quiet" figures nowrap>
        {`${formatRate(box.tenthPencePerKg)} · ${formatWeight(box.guaranteedGrams)}`}
      </Text>
      <Stock free={offer?.free ?? 0} held={offer?.held ?? 0} open={day?.isInTime ?? false} />
      <Link
        href={`/boxes/${box.slug}`}
        aria-label={`See inside: ${box.name}`}
        style={css('w-link', 'w-link-alone', 'w-good-go')}
      >
        See inside
        <Icon name="forward" size={18} />
      </Link>
    </View>
  );
}
