import { Money } from '#components/ui/money.tsx';
import { Table } from '#components/ui/table.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import { formatDay } from '#shared/domain/words.ts';

type DayRow = { id: string; day: string; state: string; carcases: number; orders: number; soldPence: number };

/** The cutting days at a glance: what hangs for them and what is sold. */
export function TodayDays({ days }: { days: readonly DayRow[] }) {
  return (
    <Table
      caption="Cutting days"
      rows={days}
      rowKey={(row) => row.id}
      empty="No cutting day is planned."
      columns={[
        {
          id: 'day',
          title: 'Day',
          cell: (row) => (
            <TextLink href={`/office/cutting-days/${row.id}`} name={`${formatDay(row.day)}, ${row.state}`}>
              {formatDay(row.day)}
            </TextLink>
          ),
        },
        { id: 'state', title: 'State', cell: (row) => row.state },
        { id: 'carcases', title: 'Carcases', align: 'end', cell: (row) => row.carcases },
        { id: 'orders', title: 'Orders', align: 'end', cell: (row) => row.orders },
        { id: 'sold', title: 'Sold', align: 'end', cell: (row) => <Money pence={row.soldPence} /> },
      ]}
    />
  );
}
