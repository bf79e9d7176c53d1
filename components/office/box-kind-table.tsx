import { Badge } from '#components/ui/badge.tsx';
import { Money } from '#components/ui/money.tsx';
import { Table } from '#components/ui/table.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import type { BoxKind } from '#shared/contracts/office.ts';
import { ratePerKg } from '#shared/domain/money.ts';
import { formatRate, formatWeight } from '#shared/domain/words.ts';

export function BoxKindTable({ boxKinds }: { boxKinds: readonly BoxKind[] }) {
  return (
    <Table
      caption="Kinds of box"
      rows={boxKinds}
      rowKey={(box) => box.id}
      columns={[
        { id: 'name', title: 'Box', cell: (box) => <TextLink href={`/office/boxes/${box.id}`}>{box.name}</TextLink> },
        { id: 'weight', title: 'At least', align: 'end', cell: (box) => formatWeight(box.guaranteedGrams) },
        { id: 'price', title: 'Price', align: 'end', cell: (box) => <Money pence={box.pricePence} /> },
        {
          id: 'rate',
          title: 'Per kg',
          align: 'end',
          cell: (box) => formatRate(ratePerKg(box.pricePence, box.guaranteedGrams)),
        },
        { id: 'demand', title: 'Likely to sell', align: 'end', cell: (box) => box.demandBoxes },
        {
          id: 'state',
          title: 'Offered',
          cell: (box) => <Badge kind={box.isActive ? 'free' : 'quiet'}>{box.isActive ? 'yes' : 'no'}</Badge>,
        },
      ]}
    />
  );
}
