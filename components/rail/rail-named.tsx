import { View } from 'react-native';
import { formatWeight } from '#shared/domain/words.ts';
import { css } from '#components/theme/css.ts';
import { IconButton } from '#components/ui/icon-button.tsx';
import { Text } from '#components/ui/text.tsx';
import { holds, type RailColumn } from './rail-geometry.ts';
import { describeFill, type RailMode } from './rail-words.ts';

type RailNamedProps = {
  columns: RailColumn[];
  chosenId: string | undefined;
  mode: RailMode;
  onChoose: (id: string) => void;
};

/** Names the primal that was tapped. Its two buttons reach the narrow primals that a finger cannot hit. */
export function RailNamed({ columns, chosenId, mode, onChoose }: RailNamedProps) {
  const at = columns.findIndex((column) => holds(column.primal, chosenId));
  const column = columns[at];
  if (!column) return null;
  const before = columns[at - 1];
  const after = columns[at + 1];
  return (
    <View style={css('rail-named')}>
      <IconButton
        icon="previous"
        name="Previous primal"
        disabled={!before}
        onPress={() => before && onChoose(before.primal.id)}
      />
      <View style={css('rail-named-words')}>
        <Text size="small" align="centre" figures live="status">
          <Text size="small" weight="bold">
            {column.primal.name}
          </Text>
          {` ${formatWeight(column.primal.grams)}: ${describeFill(column, mode)}`}
        </Text>
      </View>
      <IconButton icon="next" name="Next primal" disabled={!after} onPress={() => after && onChoose(after.primal.id)} />
    </View>
  );
}
