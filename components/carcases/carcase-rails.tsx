import { View } from 'react-native';
import { Rail } from '#components/rail/rail.tsx';
import { RailLegend } from '#components/rail/rail-legend.tsx';
import { css } from '#components/theme/css.ts';
import { Text } from '#components/ui/text.tsx';
import type { Carcase } from '#shared/contracts/carcases.ts';
import { formatWeight } from '#shared/domain/words.ts';

/** Both sides on one scale of kilograms; bone, fat and loss are printed beside, since they do not hang there. */
export function CarcaseRails({ rails, name }: { rails: Carcase['rails']; name: string }) {
  const scaleGrams = Math.max(
    1,
    ...rails.map(({ rail }) => rail.primals.reduce((sum, primal) => sum + primal.grams, 0)),
  );
  return (
    <View style={css('w-stack')}>
      <RailLegend />
      {rails.map(({ side, sideGrams, rail, boneFatLossGrams }) => (
        <View key={side} style={css('w-stack-s')}>
          <View style={css('w-row-between')}>
            <Text weight="bold">{`${side === 'left' ? 'Left' : 'Right'} side`}</Text>
            <Text size="small" tone="quiet" figures>
              {`${formatWeight(sideGrams)}, of it bone, fat and loss ${formatWeight(boneFatLossGrams)}`}
            </Text>
          </View>
          <Rail
            primals={rail.primals}
            narrowPrimals={rail.narrowPrimals}
            caption={`${name}, ${side}`}
            scaleGrams={scaleGrams}
            height="slim"
            legend={false}
          />
        </View>
      ))}
    </View>
  );
}
