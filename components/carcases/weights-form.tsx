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
  const isFlat = depth === 'primals';
  return (
    <FormFrame name="Weights" onSubmit={onSubmit}>
      <View style={css(isFlat ? 'w-fields' : 'w-stack')}>
        {groupsOf(nodes, depth).map(({ name, rows }) => (
          <View key={name} role="group" aria-label={name} style={css(!isFlat && 'w-stack-s', !isFlat && 'w-ruled')}>
            {isFlat ? null : <SmallCaps>{name}</SmallCaps>}
            <View style={css('w-fields')}>
              {rows.map(({ node, at }) => (
                <WeightRow key={node.path} control={control} node={node} at={at} />
              ))}
            </View>
          </View>
        ))}
      </View>
      <Text size="small" tone="quiet" measure>
        What is weighed is never overwritten by an estimate, and rescales what lies under it. Parts may differ from a
        weighed whole by up to 0.5 % of it: that is shown as the scales’ disagreement. More is refused.
      </Text>
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

/** Carcase, side and quarters; or the primals, alone or each with what is cut from it. */
function groupsOf(nodes: readonly CutoutNode[], depth: WeighingDepth): { name: string; rows: Row[] }[] {
  const rows = nodes.map((node, at) => ({ node, at }));
  if (depth === 'quarters') {
    const whole = rows.filter(({ node }) => node.level !== 'primal' && node.level !== 'line');
    return [{ name: 'Carcase, side and quarters', rows: whole }];
  }
  const linesOf = ({ path }: CutoutNode) =>
    rows.filter(({ node }) => node.level === 'line' && node.parentPath === path);
  return rows
    .filter(({ node }) => node.level === 'primal')
    .map((primal) => ({
      name: primal.node.name,
      rows: depth === 'primals' ? [primal] : [primal, ...linesOf(primal.node)],
    }));
}
