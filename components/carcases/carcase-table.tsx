import { SourceMark } from '#components/ui/source-mark.tsx';
import { Table } from '#components/ui/table.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import type { CarcaseSummary } from '#shared/contracts/carcases.ts';
import { formatCount, formatDay, formatKilograms } from '#shared/domain/words.ts';
import { describeClass, nameCarcase } from './carcase-words.ts';

/** The carcases of one cutting day. */
export function CarcaseTable({ carcases }: { carcases: readonly CarcaseSummary[] }) {
  const coldGrams = carcases.reduce((sum, carcase) => sum + carcase.coldGrams, 0);
  return (
    <Table
      caption="Carcases of this day"
      rows={carcases}
      rowKey={(carcase) => carcase.id}
      empty="No animal is booked for this day yet."
      columns={[
        {
          id: 'name',
          title: 'Carcase',
          cell: (carcase) => <TextLink href={`/office/carcases/${carcase.id}`}>{nameCarcase(carcase)}</TextLink>,
          foot: carcases.length > 0 ? 'Together' : '',
        },
        { id: 'state', title: 'State', cell: (carcase) => carcase.state },
        { id: 'killed', title: 'Kill day', cell: (carcase) => formatDay(carcase.killDay) },
        { id: 'class', title: 'Class', cell: describeClass },
        {
          id: 'age',
          title: 'Age',
          align: 'end',
          cell: (carcase) =>
            `${formatCount(carcase.ageMonths, 'month')}${carcase.isOverThirtyMonths ? ', over 30' : ''}`,
        },
        {
          id: 'cold',
          title: 'Cold weight',
          align: 'end',
          cell: (carcase) => formatKilograms(carcase.coldGrams),
          foot: carcases.length > 0 ? formatKilograms(coldGrams) : '',
        },
        { id: 'source', title: 'Weight is', cell: (carcase) => <SourceMark source={carcase.coldSource} /> },
      ]}
    />
  );
}
