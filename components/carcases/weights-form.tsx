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

export type WeighingDepth = 'quarters' | 'primals' | 'cuts';

type WeightsFormProps = {
  control: Control<Weights>;
  /** The parts of one side that may be weighed, in the order of the form's rows. */
  nodes: readonly CutoutNode[];
  /** How far down the parts are shown; what was typed further down is kept. */
  depth: WeighingDepth;
  onSubmit: () => void;
  busy: boolean;
};

/** Weights read off the scale. What is left empty stays an estimate; an emptied field takes its weight back. */
export function WeightsForm({ control, nodes, depth, onSubmit, busy }: WeightsFormProps) {
  const groups = groupsOf(nodes, depth);
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
        required={false}
      />
      <Text size="small" tone="quiet" figures>
        {differenceWords(grams, node.estimatedGrams)}
      </Text>
    </View>
  );
}

type Row = { node: CutoutNode; at: number };

/** Sides and quarters, then the primals, each with its lines when the cuts are weighed. */
function groupsOf(nodes: readonly CutoutNode[], depth: WeighingDepth): { name: string; rows: Row[] }[] {
  const rows = nodes.map((node, at) => ({ node, at }));
  const whole = rows.filter(({ node }) => node.level === 'side' || node.level === 'quarter');
  const primals = rows.filter(({ node }) => node.level === 'primal');
  if (depth === 'quarters') return [{ name: 'Side and quarters', rows: whole }];
  if (depth === 'primals') return [{ name: 'Primals', rows: primals }];
  return primals.map((primal) => ({
    name: primal.node.name,
    rows: rows.filter(({ node }) => node.level === 'line' && node.parentPath === primal.node.path),
  }));
}
