import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { Text } from '#components/ui/text.tsx';
import type { SpecificationFault } from '#shared/engine/figures/check-specification.ts';

type FaultListProps = {
  faults: readonly SpecificationFault[];
  /** Goes to where it can be put right; absent where one is there already. */
  onGo?: (fault: SpecificationFault) => void;
};

/** What keeps the specification from being saved, a sentence each. */
export function FaultList({ faults, onGo }: FaultListProps) {
  if (faults.length === 0) return null;
  return (
    <View role="list" aria-label="What does not add up" style={css('w-stack-s')}>
      {faults.map((fault) => (
        <View key={`${fault.node} ${fault.sentence}`} role="listitem" style={css('w-row')}>
          <Text tone="danger" weight="strong">
            {fault.sentence}
          </Text>
          {onGo ? (
            <Button
              kind="quiet"
              small
              label="Go there"
              name={`Go there: ${fault.sentence}`}
              onPress={() => onGo(fault)}
            />
          ) : null}
        </View>
      ))}
    </View>
  );
}
