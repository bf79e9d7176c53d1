import type { Href } from 'expo-router';
import { Badge } from '#components/ui/badge.tsx';
import { Table } from '#components/ui/table.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import type { CuttingDay } from '#shared/contracts/carcases.ts';
import { formatDayTime, formatDayWithYear, formatKilograms } from '#shared/domain/words.ts';

const kinds = { planned: 'quiet', open: 'free', closed: 'sold' } as const;

type DayTableProps = {
  days: readonly CuttingDay[];
  /** Where a day leads: to its carcases, or for a packer to its packing. */
  hrefOf: (dayId: string) => Href;
};

export function DayTable({ days, hrefOf }: DayTableProps) {
  return (
    <Table
      caption="Cutting days"
      rows={days}
      rowKey={(day) => day.id}
      columns={[
        {
          id: 'day',
          title: 'Day',
          cell: (day) => <TextLink href={hrefOf(day.id)}>{formatDayWithYear(day.day)}</TextLink>,
        },
        { id: 'state', title: 'State', cell: (day) => <Badge kind={kinds[day.state]}>{day.state}</Badge> },
        { id: 'cutoff', title: 'Orders until', cell: (day) => formatDayTime(day.cutOffAt) },
        { id: 'carcases', title: 'Carcases', align: 'end', cell: (day) => day.carcases.length },
        { id: 'cold', title: 'Cold weight', align: 'end', cell: (day) => formatKilograms(day.coldGrams) },
        { id: 'orders', title: 'Orders', align: 'end', cell: (day) => day.orders },
      ]}
    />
  );
}
