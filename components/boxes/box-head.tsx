import { View } from 'react-native';
import type { Box } from '#shared/contracts/shop.ts';
import { formatCount, formatWeight } from '#shared/domain/words.ts';
import { Rail } from '#components/rail/rail.tsx';
import { css } from '#components/theme/css.ts';
import { Heading } from '#components/ui/heading.tsx';
import { Text } from '#components/ui/text.tsx';
import { TextLink } from '#components/ui/text-link.tsx';

/** Name, guaranteed weight, and what so many of these boxes take of one side. */
export function BoxHead({ box }: { box: Box }) {
  const size = [
    `At least ${formatWeight(box.guaranteedGrams)}`,
    `about ${formatCount(box.servings, 'serving')}`,
    `${formatCount(box.freezerLitres, 'litre')} of freezer`,
  ].join(' · ');
  return (
    <View style={css('w-section')}>
      <View style={css('w-hero')}>
        <TextLink href="/" place="alone" tone="ink" icon="back">
          Boxes
        </TextLink>
        <Heading level={1} look="display">
          {box.name}
        </Heading>
        <Text size="lead" tone="quiet" measure>
          {`${box.summary.replace(/\.$/, '')}. ${size}.`}
        </Text>
      </View>
      <Rail
        mode="takes"
        primals={box.rail.rail.primals}
        narrowPrimals={box.rail.rail.narrowPrimals}
        legend={false}
        caption={`${formatCount(box.rail.boxes, 'such box', 'such boxes')}, one side: the red is what they take.`}
        captionShown
      />
    </View>
  );
}
