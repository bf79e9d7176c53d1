import { View } from 'react-native';
import type { ShopHome } from '#shared/contracts/shop.ts';
import { css } from '#components/theme/css.ts';
import { Heading } from '#components/ui/heading.tsx';
import { Text } from '#components/ui/text.tsx';

/** The farm in its own words, a paragraph a line break, and the butchers that sell its beef. */
export function FarmStory({ farm, butchers }: Pick<ShopHome, 'farm' | 'butchers'>) {
  const paragraphs = farm.story.split(/\n+/).filter(Boolean);
  return (
    <View style={css('w-columns', 'w-columns-side')}>
      <View style={css('w-section')}>
        <Heading level={2}>{`About ${farm.name}`}</Heading>
        <View style={css('w-prose')}>
          {paragraphs.map((paragraph) => (
            <Text key={paragraph}>{paragraph}</Text>
          ))}
        </View>
      </View>
      {butchers.length > 0 ? (
        <View style={css('w-section')}>
          <Heading level={2}>At the butcher’s</Heading>
          <Text tone="quiet">These shops hang and sell our beef by the side and the quarter.</Text>
          <View style={css('w-rows')}>
            {butchers.map((butcher) => (
              <View key={butcher.businessName} style={css('w-stack-s')}>
                <Text weight="strong">{butcher.businessName}</Text>
                <Text size="small" tone="quiet">
                  {butcher.town}
                </Text>
              </View>
            ))}
          </View>
        </View>
      ) : null}
    </View>
  );
}
