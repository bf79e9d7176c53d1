import type { ReactNode } from 'react';
import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Badge } from '#components/ui/badge.tsx';
import { Text } from '#components/ui/text.tsx';
import type { Fill } from '#shared/contracts/packs.ts';
import { formatWeight } from '#shared/domain/words.ts';
import { fillState, missingWords, nameItem, unfilledFirst } from './fill-words.ts';

type FillListProps = {
  fills: readonly Fill[];
  /** What can be done about one that is not filled. */
  actionsOf: (fill: Fill) => ReactNode;
};

/** Every box, loose pack and trade line that the day must fill: with which packs, or what is missing. */
export function FillList({ fills, actionsOf }: FillListProps) {
  if (fills.length === 0) return <Text tone="quiet">Nothing is ordered for this day.</Text>;
  return (
    <View role="list" style={css('w-rows')}>
      {unfilledFirst(fills).map((fill) => (
        <View
          key={`${fill.orderNo} ${fill.orderName} ${fill.item} ${fill.copy}`}
          role="listitem"
          style={css('w-stack-s')}
        >
          <View style={css('w-row-between')}>
            <Text weight="bold">{`${fill.orderNo} ${fill.orderName}: ${nameItem(fill)}`}</Text>
            <Badge kind={fill.isFilled ? 'free' : 'held'}>{fillState(fill)}</Badge>
          </View>
          {fill.missing.map((missing) => (
            <Text key={missing.line} weight="strong" tone="danger">
              {missingWords(missing)}
            </Text>
          ))}
          {fill.packs.length > 0 ? (
            <Text size="small" tone="quiet" figures>
              {`${formatWeight(fill.grams)}${fill.guaranteedGrams > 0 ? ` of ${formatWeight(fill.guaranteedGrams)} promised` : ''}: ${fill.packs.map(({ code, cut, grams }) => `${code} ${cut} ${formatWeight(grams)}`).join(', ')}`}
            </Text>
          ) : null}
          {fill.isFilled || fill.isPacked ? null : actionsOf(fill)}
        </View>
      ))}
    </View>
  );
}
