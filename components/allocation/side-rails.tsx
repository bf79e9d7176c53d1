import type { ReactNode } from 'react';
import { View } from 'react-native';
import { RailLegend } from '#components/rail/rail-legend.tsx';
import { css } from '#components/theme/css.ts';
import { Heading } from '#components/ui/heading.tsx';
import type { PlannedSide } from '#shared/contracts/allocation.ts';
import type { Members } from './locks.ts';
import { SideRail } from './side-rail.tsx';

type SideRailsProps = {
  sides: readonly PlannedSide[];
  members: Members;
  chosen: { side: PlannedSide; primalId: string } | undefined;
  onChoose: (side: PlannedSide, primalId: string) => void;
  /** The ways of the chosen primal, under its rail, where there is no room beside the rails. */
  panelBelow: ReactNode;
  /** Names the chosen primal under its rail, with steps to its neighbours. */
  isNaming: boolean;
};

/** All sides of the day on one scale of kilograms, under one legend. */
export function SideRails({ sides, members, chosen, onChoose, panelBelow, isNaming }: SideRailsProps) {
  const weights = sides.map(({ rail }) => rail.primals.reduce((sum, primal) => sum + primal.grams, 0));
  const scaleGrams = Math.max(1, ...weights);
  return (
    <View style={css('w-stack-l')}>
      <View style={css('w-row-between', 'w-rule-below')}>
        <Heading level={2}>Carcases</Heading>
        <RailLegend />
      </View>
      {sides.map((side) => (
        <SideRail
          key={`${side.carcaseId} ${side.side}`}
          side={side}
          members={members}
          scaleGrams={scaleGrams}
          chosenId={side === chosen?.side ? chosen.primalId : undefined}
          onChoose={(primalId) => onChoose(side, primalId)}
          naming={isNaming}
        >
          {side === chosen?.side ? panelBelow : null}
        </SideRail>
      ))}
    </View>
  );
}
