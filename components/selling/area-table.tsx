import { Badge } from '#components/ui/badge.tsx';
import { Button } from '#components/ui/button.tsx';
import { Table } from '#components/ui/table.tsx';
import type { DeliveryArea } from '#shared/contracts/delivery.ts';
import { formatMoney } from '#shared/domain/words.ts';
import { WEEKDAYS } from './area-form.tsx';

type AreaTableProps = { areas: readonly DeliveryArea[]; onEdit: (area: DeliveryArea) => void };

export function AreaTable({ areas, onEdit }: AreaTableProps) {
  return (
    <Table
      caption="Delivery areas"
      rows={areas}
      rowKey={(area) => area.id}
      columns={[
        { id: 'name', title: 'Area', cell: ({ name }) => name },
        { id: 'postcodes', title: 'Postcodes', cell: ({ prefixes }) => prefixes.join(', ') },
        {
          id: 'when',
          title: 'Round',
          cell: ({ weekday, startsAt, endsAt }) => `${WEEKDAYS[weekday - 1]}, ${startsAt} to ${endsAt}`,
        },
        { id: 'stops', title: 'Stops', align: 'end', cell: ({ capacity }) => capacity },
        { id: 'price', title: 'Price', align: 'end', cell: ({ pricePence }) => formatMoney(pricePence) },
        {
          id: 'free',
          title: 'Free from',
          align: 'end',
          cell: ({ freeFromPence }) => (freeFromPence === null ? 'never' : formatMoney(freeFromPence)),
        },
        {
          id: 'state',
          title: 'State',
          cell: ({ isActive }) => (
            <Badge kind={isActive ? 'free' : 'quiet'}>{isActive ? 'served' : 'not served'}</Badge>
          ),
        },
        {
          id: 'edit',
          title: 'Edit',
          cell: (area) => (
            <Button kind="quiet" small label="Edit" name={`Edit the area ${area.name}`} onPress={() => onEdit(area)} />
          ),
        },
      ]}
    />
  );
}
