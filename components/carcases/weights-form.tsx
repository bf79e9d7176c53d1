import { View } from 'react-native';
import { useWatch, type Control } from 'react-hook-form';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { FormFrame } from '#components/ui/form-frame.tsx';
import { FormNumber } from '#components/ui/form-number.tsx';
import { SmallCaps } from '#components/ui/small-caps.tsx';
import { Text } from '#components/ui/text.tsx';
import type { CutoutNode } from '#shared/contracts/carcases.ts';
import { formatGrams } from '#shared/domain/words.ts';
import { differenceWords } from './weight-difference.ts';

export type Weights = { version: number; weights: { path: string; grams: number | null }[] };

type WeightsFormProps = {
  control: Control<Weights>;
  /** The parts of one side that may be weighed, in the order of the form's rows. */
  nodes: readonly CutoutNode[];
  onSubmit: () => void;
  busy: boolean;
};

/** Weights read off the scale. What is left empty stays an estimate; an emptied field takes its weight back. */
export function WeightsForm({ control, nodes, onSubmit, busy }: WeightsFormProps) {
  const groups = groupsOf(nodes);
  return (
    <FormFrame name="Weights" onSubmit={onSubmit}>
      {groups.map((group) => (
        <View key={group.name} role="group" aria-label={group.name} style={css('w-stack-s', 'w-ruled')}>
          <SmallCaps>{group.name}</SmallCaps>
          <View style={css('w-fields')}>
            {group.rows.map(({ node, at }) => (
              <WeightRow key={node.path} control={control} node={node} at={at} />
            ))}
          </View>
        </View>
      ))}
      <View style={css('w-buttons')}>
        <Button label="Save the weights" busy={busy} onPress={onSubmit} />
      </View>
    </FormFrame>
  );
}

function WeightRow({ control, node, at }: { control: Control<Weights>; node: CutoutNode; at: number }) {
  const grams = useWatch({ control, name: `weights.${at}.grams` });
  return (
    <View style={css('w-stack-s')}>
      <FormNumber
        control={control}
        name={`weights.${at}.grams`}
        unit="kilograms"
        label={node.name}
        hint={`foreseen ${formatGrams(node.estimatedGrams)}`}
        optional
      />
      <Text size="small" tone="quiet" figures>
        {differenceWords(grams, node.estimatedGrams)}
      </Text>
    </View>
  );
}

type Row = { node: CutoutNode; at: number };

/** Each primal with its lines; sides and quarters stand first. */
function groupsOf(nodes: readonly CutoutNode[]): { name: string; rows: Row[] }[] {
  const rows = nodes.map((node, at) => ({ node, at }));
  const whole = rows.filter(({ node }) => node.level === 'side' || node.level === 'quarter');
  const primals = rows.filter(({ node }) => node.level === 'primal');
  return [
    { name: 'Side and quarters', rows: whole },
    ...primals.map((primal) => ({
      name: primal.node.name,
      rows: [primal, ...rows.filter(({ node }) => node.level === 'line' && node.parentPath === primal.node.path)],
    })),
  ].filter((group) => group.rows.length > 0);
}
