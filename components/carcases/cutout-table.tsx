import { useState } from 'react';
import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Select } from '#components/ui/select.tsx';
import { SourceMark } from '#components/ui/source-mark.tsx';
import { Table } from '#components/ui/table.tsx';
import type { CutoutNode } from '#shared/contracts/carcases.ts';
import { formatGrams } from '#shared/domain/words.ts';

const LEVELS = ['carcase', 'side', 'quarter', 'primal', 'line'] as const satisfies readonly CutoutNode['level'][];

const depths = [
  { value: '1', label: 'the sides' },
  { value: '2', label: 'the quarters' },
  { value: '3', label: 'the primals' },
  { value: '4', label: 'cuts, trim, bone and fat' },
];

/** Pixels by which each level stands in from the one above it. */
const INDENT = 14;

/** The cutout as a tree that reads as a table: each figure knows whether it was foreseen or weighed. */
export function CutoutTable({ nodes }: { nodes: readonly CutoutNode[] }) {
  const [depth, setDepth] = useState('3');
  const shown = nodes.filter((node) => LEVELS.indexOf(node.level) <= Number(depth));
  return (
    <View style={css('w-stack')}>
      <Select label="Down to" width="short" value={depth} options={depths} onChange={setDepth} />
      <Table
        caption="Cutout of this carcase"
        rows={shown}
        rowKey={(node) => node.path}
        columns={[
          {
            id: 'name',
            title: 'Part',
            cell: (node) => (
              <span style={{ paddingInlineStart: LEVELS.indexOf(node.level) * INDENT }}>{node.name}</span>
            ),
          },
          { id: 'foreseen', title: 'Foreseen', align: 'end', cell: (node) => formatGrams(node.estimatedGrams) },
          { id: 'grams', title: 'Weight', align: 'end', cell: (node) => formatGrams(node.grams) },
          { id: 'source', title: 'Weight is', cell: (node) => <SourceMark source={node.source} /> },
          {
            id: 'difference',
            title: 'Scales disagree by',
            align: 'end',
            cell: (node) =>
              node.weighingDifferenceGrams === 0 ? 'nothing' : formatGrams(node.weighingDifferenceGrams),
          },
        ]}
      />
    </View>
  );
}
