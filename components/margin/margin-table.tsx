import { useState } from 'react';
import { Button } from '#components/ui/button.tsx';
import { Sheet } from '#components/ui/sheet.tsx';
import { Table } from '#components/ui/table.tsx';
import { Text } from '#components/ui/text.tsx';
import type { MarginRow } from '#shared/contracts/margin.ts';
import { formatMoney, formatRate } from '#shared/domain/words.ts';
import { MarginSum } from './margin-sum.tsx';

type MarginTableProps = {
  caption: string;
  /** What the rows are, as in `Box`. */
  what: string;
  rows: readonly MarginRow[];
  /** How a row's part of what its carcase carries was found. */
  sharing: string;
};

/** Margins by one dimension; each row opens the sum behind it. */
export function MarginTable({ caption, what, rows, sharing }: MarginTableProps) {
  const [opened, setOpened] = useState<MarginRow>();
  const sum = (of: (row: MarginRow) => number) => formatMoney(rows.reduce((total, row) => total + of(row), 0));
  return (
    <>
      <Table
        caption={caption}
        rows={rows}
        rowKey={({ id }) => id ?? 'none'}
        columns={[
          { id: 'name', title: what, cell: ({ name }) => name, foot: 'Together' },
          {
            id: 'contribution',
            title: 'Contribution',
            align: 'end',
            cell: ({ margin }) => formatMoney(margin.contributionPence),
            foot: sum(({ margin }) => margin.contributionPence),
          },
          {
            id: 'deadweight',
            title: 'Deadweight value',
            align: 'end',
            cell: ({ margin }) => formatMoney(margin.deadweightPence),
            foot: sum(({ margin }) => margin.deadweightPence),
          },
          {
            id: 'gain',
            title: 'Gain',
            align: 'end',
            cell: ({ margin }) => formatMoney(margin.gainPence),
            foot: sum(({ margin }) => margin.gainPence),
          },
          {
            id: 'rate',
            title: 'Gain per kg cold',
            align: 'end',
            cell: ({ margin }) => formatRate(margin.gainPerKg),
            foot: '',
          },
          {
            id: 'sum',
            title: 'Sum',
            cell: (row) => (
              <Button
                kind="quiet"
                small
                label="Show"
                name={`Show the sum of ${row.name}`}
                onPress={() => setOpened(row)}
              />
            ),
            foot: '',
          },
        ]}
      />
      <Sheet open={opened !== undefined} onClose={() => setOpened(undefined)} title={opened?.name ?? ''}>
        {opened ? <MarginSum margin={opened.margin} /> : null}
        <Text size="small" tone="quiet">
          {sharing}
        </Text>
      </Sheet>
    </>
  );
}
