import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Disclosure } from '#components/ui/disclosure.tsx';
import type { PlannedSide } from '#shared/contracts/allocation.ts';
import { nameSide } from './plan-words.ts';
import { WaysTable } from './ways-table.tsx';

type WaysSectionProps = {
  sides: readonly PlannedSide[];
  onChoose: (side: PlannedSide, primalId: string) => void;
};

/** Folded away: the rails say the same to the eye. */
export function WaysSection({ sides, onChoose }: WaysSectionProps) {
  return (
    <View style={css('w-stack')}>
      {sides.map((side) => (
        <Disclosure key={`${side.carcaseId} ${side.side}`} ruled words={`Ways of ${nameSide(side)}`}>
          <WaysTable side={side} onChoose={(primalId) => onChoose(side, primalId)} />
        </Disclosure>
      ))}
    </View>
  );
}
