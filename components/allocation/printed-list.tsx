import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Heading } from '#components/ui/heading.tsx';
import { Table } from '#components/ui/table.tsx';
import { Text } from '#components/ui/text.tsx';
import type { Allocation, PlannedSide } from '#shared/contracts/allocation.ts';
import { formatDayWithYear, formatGrams } from '#shared/domain/words.ts';
import { nameSide } from './plan-words.ts';
import { wayWords } from './ways-table.tsx';

type Row = { id: string; primal: string; way: string; cut: string; grams: number };

/** The plan as a cutting list on paper: a sheet for each carcase, its sides one after the other. Unseen on a screen. */
export function PrintedList({ plan }: { plan: Pick<Allocation, 'sides' | 'day' | 'state'> }) {
  const carcases = [...new Set(plan.sides.map(({ carcaseId }) => carcaseId))];
  return (
    <View style={css('w-only-print')}>
      {carcases.map((carcaseId, at) => (
        // The browser's own rule: each carcase begins a sheet.
        <div key={carcaseId} style={at > 0 ? { breakBefore: 'page' } : undefined}>
          <Heading level={1}>{`Cutting list, ${formatDayWithYear(plan.day)}`}</Heading>
          <Text>
            {plan.state === 'published' ? 'By the plan that is on sale.' : 'By a plan that is not on sale yet.'}
          </Text>
          {plan.sides
            .filter((side) => side.carcaseId === carcaseId)
            .map((side) => (
              <SideList key={side.side} side={side} />
            ))}
        </div>
      ))}
    </View>
  );
}

function SideList({ side }: { side: PlannedSide }) {
  const rows = listRows(side);
  return (
    <Table
      caption={`${nameSide(side)}: ear tag ${side.earTag}, ${formatGrams(side.sideGrams)} ${side.source}`}
      captionShown
      rows={rows}
      rowKey={({ id }) => id}
      columns={[
        { id: 'primal', title: 'Primal', cell: ({ primal }) => primal, foot: 'Together' },
        { id: 'way', title: 'Cut as', cell: ({ way }) => way, foot: '' },
        { id: 'cut', title: 'Cut', cell: ({ cut }) => cut, foot: '' },
        {
          id: 'grams',
          title: 'Estimated',
          align: 'end',
          cell: ({ grams }) => formatGrams(grams),
          foot: formatGrams(rows.reduce((sum, { grams }) => sum + grams, 0)),
        },
        // Room to write on.
        { id: 'weighed', title: 'Weighed', cell: () => '', foot: '' },
      ]}
    />
  );
}

/** One row for each cut; a primal that leaves whole has a row without one. */
export function listRows(side: Pick<PlannedSide, 'choices'>): Row[] {
  return side.choices.flatMap((choice) => {
    const { choiceId, name: primal, cuts } = choice;
    const way = wayWords(choice);
    if (cuts.length === 0) return [{ id: choiceId, primal, way, cut: 'leaves whole', grams: 0 }];
    return cuts.map(({ cutId, name, grams }, at) => ({
      id: `${choiceId} ${cutId}`,
      primal: at === 0 ? primal : '',
      way: at === 0 ? way : '',
      cut: name,
      grams,
    }));
  });
}
