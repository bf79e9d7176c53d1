import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Disclosure } from '#components/ui/disclosure.tsx';
import { Table } from '#components/ui/table.tsx';
import type { Outcome } from '#shared/contracts/plan-jobs.ts';
import { formatMoney, formatWeight } from '#shared/domain/words.ts';
import { perColdKg, signedMoney } from './plan-words.ts';

type Row = { id: string; name: string; before: string; after: string; difference: string };
type OutcomesProps = { before: Outcome; after: Outcome };

/** Both answers of a what-if, side by side. */
export function OutcomeTable({ before, after }: OutcomesProps) {
  const changed = changedWays(before, after);
  return (
    <View style={css('w-stack')}>
      <SideBySide caption="The day as it is and as supposed" rows={moneyRows(before, after)} />
      <SideBySide caption="Boxes" rows={boxRows(before, after)} captionShown />
      <SideBySide caption="Cuts that change" rows={cutRows(before, after)} captionShown />
      <Disclosure words={`${changed.length} ways of cutting that change`} ruled>
        <SideBySide caption="Ways that change" rows={changed} />
      </Disclosure>
    </View>
  );
}

function SideBySide({ caption, rows, captionShown = false }: { caption: string; rows: Row[]; captionShown?: boolean }) {
  return (
    <Table
      caption={caption}
      captionShown={captionShown}
      rows={rows}
      rowKey={({ id }) => id}
      empty="Nothing changes here."
      columns={[
        { id: 'name', title: 'What', cell: ({ name }) => name },
        { id: 'before', title: 'As it is', align: 'end', cell: (row) => row.before },
        { id: 'after', title: 'As supposed', align: 'end', cell: (row) => row.after },
        { id: 'difference', title: 'Difference', align: 'end', cell: ({ difference }) => difference },
      ]}
    />
  );
}

function moneyRows(before: Outcome, after: Outcome): Row[] {
  const money = (id: 'contributionPence' | 'deadweightPence' | 'gainPence', name: string): Row => ({
    ...{ id, name },
    before: `${formatMoney(before[id])}, ${perColdKg(before[id], before)}`,
    after: `${formatMoney(after[id])}, ${perColdKg(after[id], after)}`,
    difference: signedMoney(after[id] - before[id]),
  });
  const proof = ({ isProven, gapBasisPoints }: Outcome) =>
    `${isProven ? 'proven' : 'best so far'}, within ${(gapBasisPoints / 100).toFixed(2)} %`;
  return [
    money('contributionPence', 'Contribution'),
    money('deadweightPence', 'Deadweight value'),
    money('gainPence', 'Gain'),
    counted('carcases', { name: 'Carcases', before: before.carcases, after: after.carcases }),
    weighed('hung', { name: 'Weight after hanging', before: before.hungGrams, after: after.hungGrams }),
    { id: 'proof', name: 'Answer', before: proof(before), after: proof(after), difference: '' },
    {
      id: 'short',
      name: 'Missing of what is promised',
      before: before.shortfalls.join('; ') || 'nothing',
      after: after.shortfalls.join('; ') || 'nothing',
      difference: '',
    },
  ];
}

type Pair = { name: string; before: number; after: number };

function counted(id: string, { name, before, after }: Pair): Row {
  const more = after - before;
  const difference = more === 0 ? 'none' : `${more > 0 ? '+' : '−'} ${Math.abs(more)}`;
  return { id, name, before: String(before), after: String(after), difference };
}

function weighed(id: string, { name, before, after }: Pair): Row {
  const more = after - before;
  const difference = more === 0 ? 'none' : `${more > 0 ? '+' : '−'} ${formatWeight(Math.abs(more))}`;
  return { id, name, before: formatWeight(before), after: formatWeight(after), difference };
}

function boxRows(before: Outcome, after: Outcome): Row[] {
  const ids = [...new Set([...before.boxes, ...after.boxes].map(({ id }) => id))];
  return ids.map((id) => {
    const [was, is] = [before, after].map(({ boxes }) => boxes.find((box) => box.id === id));
    return counted(id, { name: is?.name ?? was?.name ?? id, before: was?.count ?? 0, after: is?.count ?? 0 });
  });
}

function cutRows(before: Outcome, after: Outcome): Row[] {
  const ids = [...new Set([...before.cuts, ...after.cuts].map(({ id }) => id))];
  return ids.flatMap((id) => {
    const [was, is] = [before, after].map(({ cuts }) => cuts.find((cut) => cut.id === id));
    const name = is?.name ?? was?.name ?? id;
    const pair = (of: 'loosePacks' | 'madeGrams' | 'leftGrams') => ({ before: was?.[of] ?? 0, after: is?.[of] ?? 0 });
    return [
      weighed(`${id} made`, { name: `${name}, made`, ...pair('madeGrams') }),
      counted(`${id} loose`, { name: `${name}, loose packs`, ...pair('loosePacks') }),
      weighed(`${id} left`, { name: `${name}, left over`, ...pair('leftGrams') }),
    ].filter(({ difference }) => difference !== 'none');
  });
}

function changedWays(before: Outcome, after: Outcome): Row[] {
  return after.ways.flatMap(({ id, place, way }) => {
    const was = before.ways.find((one) => one.id === id)?.way ?? '–';
    return was === way ? [] : [{ id, name: place, before: was, after: way, difference: '' }];
  });
}
