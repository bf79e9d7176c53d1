import type { ReactNode } from 'react';
import { View } from 'react-native';
import { Rail } from '#components/rail/rail.tsx';
import { css } from '#components/theme/css.ts';
import { Heading } from '#components/ui/heading.tsx';
import { Text } from '#components/ui/text.tsx';
import type { PlannedSide } from '#shared/contracts/allocation.ts';
import { formatWeight } from '#shared/domain/words.ts';
import type { Members } from './locks.ts';
import { nameSide } from './plan-words.ts';

type SideRailProps = {
  side: PlannedSide;
  members: Members;
  /** Kilograms of the longest rail, so that all rails compare. */
  scaleGrams: number;
  chosenId: string | undefined;
  onChoose: (primalId: string) => void;
  /** Where no panel stands beside the rails, the chosen primal is named under its own. */
  naming: boolean;
  children?: ReactNode;
};

/** One side on its rail; each primal is a button that opens its ways. */
export function SideRail({ side, members, scaleGrams, chosenId, onChoose, naming, children }: SideRailProps) {
  const narrow = side.rail.narrowPrimals.map((primal) => ({ ...primal, memberIds: members[primal.id] ?? [primal.id] }));
  const buyers = [...new Set(side.choices.flatMap((choice) => choice.soldTo ?? []))];
  return (
    <View style={css('w-stack')}>
      <View style={css('w-stack-s')}>
        <View style={css('w-row-between')}>
          <Heading level={3}>{nameSide(side)}</Heading>
          <Text size="small" tone="quiet" figures>
            {[`${formatWeight(side.sideGrams)} ${side.source}`, ...buyers.map((buyer) => `in part to ${buyer}`)].join(
              ' · ',
            )}
          </Text>
        </View>
        <Rail
          primals={side.rail.primals}
          narrowPrimals={narrow}
          caption={nameSide(side)}
          scaleGrams={scaleGrams}
          height="slim"
          legend={false}
          naming={naming}
          selectedId={chosenId}
          onSelect={onChoose}
        />
      </View>
      {children}
    </View>
  );
}
