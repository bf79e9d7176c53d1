import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Figure } from '#components/ui/figure.tsx';
import { Text } from '#components/ui/text.tsx';
import type { Allocation } from '#shared/contracts/allocation.ts';

/** The boxes on offer, what is spoken for, and what holds back the next one. */
export function OfferList({ boxes }: { boxes: Allocation['boxes'] }) {
  return (
    <View role="list" style={css('w-rows')}>
      {boxes.map((box) => (
        <View key={box.boxKindId} role="listitem" style={css('w-stack-s')}>
          <View style={css('w-row-between')}>
            <Text weight="bold">{box.name}</Text>
            <Figure>{box.count}</Figure>
          </View>
          <Text size="small" tone="quiet">
            {box.limitedBy.length > 0
              ? `Limited by ${box.limitedBy.join('; ')}`
              : 'Limited by what people are likely to buy'}
          </Text>
          {box.sold + box.held > 0 ? (
            <Text size="small" figures>
              {[box.sold > 0 ? `${box.sold} sold` : '', box.held > 0 ? `${box.held} held` : '']
                .filter(Boolean)
                .join(', ')}
            </Text>
          ) : null}
        </View>
      ))}
    </View>
  );
}
