import { View } from 'react-native';
import { Rail } from '#components/rail/rail.tsx';
import { css } from '#components/theme/css.ts';
import { Heading } from '#components/ui/heading.tsx';
import { SourceMark } from '#components/ui/source-mark.tsx';
import { Text } from '#components/ui/text.tsx';
import type { TradeCarcase } from '#shared/contracts/trade.ts';
import { formatKilograms, formatWeight } from '#shared/domain/words.ts';
import { describeBeast, nameBeast } from './trade-words.ts';

/** One coming carcase: what it is, what it weighs, and what of it is still free. */
export function ComingCarcase({ carcase, scaleGrams }: { carcase: TradeCarcase; scaleGrams: number }) {
  return (
    <View style={css('w-stack')}>
      <View style={css('w-row-between')}>
        <Heading level={3}>{nameBeast(carcase)}</Heading>
        <View style={css('w-row')}>
          <Text weight="bold" figures>
            {formatKilograms(carcase.coldGrams)}
          </Text>
          <SourceMark source={carcase.coldSource} />
        </View>
      </View>
      <Text tone="quiet">{describeBeast(carcase)}</Text>
      {carcase.sides.map(({ side, sideGrams, rail }) => (
        <View key={side} style={css('w-stack-s')}>
          <Text size="small" tone="quiet" figures>
            {`${side === 'left' ? 'Left' : 'Right'} side, ${formatWeight(sideGrams)}`}
          </Text>
          <Rail
            primals={rail.primals}
            narrowPrimals={rail.narrowPrimals}
            caption={`${nameBeast(carcase)}, ${side}`}
            scaleGrams={scaleGrams}
            height="slim"
            legend={false}
          />
        </View>
      ))}
    </View>
  );
}

/** Kilograms of the longest rail of a day, so that its rails compare. */
export function railScale(carcases: readonly TradeCarcase[]): number {
  const weights = carcases.flatMap(({ sides }) =>
    sides.map(({ rail }) => rail.primals.reduce((sum, primal) => sum + primal.grams, 0)),
  );
  return Math.max(1, ...weights);
}
