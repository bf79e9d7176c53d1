import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Figure } from '#components/ui/figure.tsx';
import { Text } from '#components/ui/text.tsx';
import type { Allocation } from '#shared/contracts/allocation.ts';

type OfferListProps = Pick<Allocation, 'boxes' | 'isExplained'>;

/** The boxes on offer, what is spoken for, and what holds back the next one. */
export function OfferList({ boxes, isExplained }: OfferListProps) {
  return (
    <View role="list" style={css('w-rows')}>
      {boxes.map((box) => (
        <View key={box.boxKindId} role="listitem" style={css('w-stack-s')}>
          <View style={css('w-row-between')}>
            <Text weight="bold">{box.name}</Text>
            <Figure>{box.count}</Figure>
          </View>
          <Text size="small" tone="quiet">
            {isExplained ? limitWords(box.limitedBy) : 'What limits it is being worked out …'}
          </Text>
          {box.promised === null || box.promised === box.count ? null : (
            <Text size="small" tone="waiting" figures>
              {`${box.promised} may be put on sale while weights are estimates`}
            </Text>
          )}
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

function limitWords(limitedBy: readonly string[]): string {
  if (limitedBy.length === 0) return 'Limited by what people are likely to buy';
  const lines = limitedBy.map((line) => line.replace(' short for one more', ''));
  return `Limited by its cuts. One more lacks ${lines.join(', ')}`;
}
