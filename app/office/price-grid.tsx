import { useState } from 'react';
import { View } from 'react-native';
import { GridTable } from '#components/margin/grid-table.tsx';
import { startEdit } from '#components/margin/margin-words.ts';
import { PriceGridForm } from '#components/margin/price-grid-form.tsx';
import { css } from '#components/theme/css.ts';
import { Disclosure } from '#components/ui/disclosure.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { Table } from '#components/ui/table.tsx';
import { Text } from '#components/ui/text.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { usePriceGrids, useSavePriceGrid } from '#hooks/margin.ts';
import { sendForm, useContractForm } from '#hooks/use-contract-form.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { PriceGrid, PriceGridEdit } from '#shared/contracts/margin.ts';
import { formatDayWithYear, formatRate } from '#shared/domain/words.ts';

const loadSchema = async () => (await import('#hooks/form-schemas.ts')).margin.PriceGridEdit;

export default function PriceGridScreen() {
  const grids = usePriceGrids();
  // Counts up to draw the form afresh, with the grid as it is now.
  const [round, setRound] = useState(0);
  const [isSaved, setSaved] = useState(false);
  const drawAfresh = (afterSaving: boolean) => {
    setSaved(afterSaving);
    setRound(round + 1);
  };
  useTitle('Price grid');
  return (
    <StateView query={grids} what="the price grid">
      {({ current, latestEdition, editions }) => (
        <View style={css('w-stack-l')}>
          <TitleBar
            back={{ href: '/office/settings', label: 'Settings' }}
            title="Price grid"
            above={`Edition ${current.edition}, in force from ${formatDayWithYear(current.validFrom)}`}
            lead="What the same carcases would bring sold deadweight: the measure of every margin."
          />
          {isSaved ? (
            <Notice kind="good" spoken title="Saved." kept="Carcases killed before its day keep their prices." />
          ) : null}
          <View style={css('w-stack')}>
            <Text measure>{`${current.name}. ${current.source}`}</Text>
            <Text figures>{`Base ${formatRate(current.baseTenthPencePerKg)} of cold weight.`}</Text>
            <GridTable conformations={current.conformations} rows={current.rows} />
          </View>
          <Edit
            key={round}
            grid={current}
            latestEdition={latestEdition}
            onSaved={() => drawAfresh(true)}
            onShowNewest={() => drawAfresh(false)}
          />
          <Disclosure words="Earlier editions" ruled>
            <Table
              caption="Editions of the price grid"
              rows={editions}
              rowKey={({ edition }) => String(edition)}
              columns={[
                { id: 'edition', title: 'Edition', cell: ({ edition }) => edition },
                { id: 'name', title: 'Name', cell: ({ name }) => name },
                { id: 'from', title: 'In force from', cell: ({ validFrom }) => formatDayWithYear(validFrom) },
                { id: 'base', title: 'Base', align: 'end', cell: (row) => formatRate(row.baseTenthPencePerKg) },
              ]}
            />
          </Disclosure>
        </View>
      )}
    </StateView>
  );
}

type EditProps = { grid: PriceGrid; latestEdition: number; onSaved: () => void; onShowNewest: () => void };

function Edit({ grid, latestEdition, onSaved, onShowNewest }: EditProps) {
  const save = useSavePriceGrid();
  const form = useContractForm<PriceGridEdit>(loadSchema, startEdit(grid, latestEdition));
  const submit = sendForm(form, async (body) => {
    await save.mutateAsync(body);
    onSaved();
  });
  return (
    <View style={css('w-stack')}>
      <PriceGridForm form={form} onSubmit={submit} busy={save.isPending} />
      <ProblemNotice error={save.error} title="The price grid was not saved." onShowNewest={onShowNewest} />
    </View>
  );
}
