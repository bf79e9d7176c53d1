import { Badge } from '#components/ui/badge.tsx';
import { Button } from '#components/ui/button.tsx';
import { Table } from '#components/ui/table.tsx';
import type { PromoCode } from '#shared/contracts/promo.ts';
import { formatDayWithYear, formatMoney } from '#shared/domain/words.ts';

type PromoTableProps = {
  codes: readonly PromoCode[];
  onClose: (code: PromoCode) => void;
  closingId: string | undefined;
};

export function PromoTable({ codes, onClose, closingId }: PromoTableProps) {
  return (
    <Table
      caption="Promotional codes"
      rows={codes}
      rowKey={(code) => code.id}
      columns={[
        { id: 'code', title: 'Code', cell: ({ code }) => code },
        { id: 'worth', title: 'Takes off', cell: worthOf },
        { id: 'from', title: 'Goods from', align: 'end', cell: ({ minimumPence }) => formatMoney(minimumPence) },
        {
          id: 'until',
          title: 'Last day',
          cell: ({ lastDay }) => (lastDay === null ? 'no end' : formatDayWithYear(lastDay)),
        },
        {
          id: 'uses',
          title: 'Used',
          align: 'end',
          cell: ({ uses, usageLimit }) => (usageLimit === null ? String(uses) : `${uses} of ${usageLimit}`),
        },
        {
          id: 'once',
          title: 'Per customer',
          cell: ({ isOncePerCustomer }) => (isOncePerCustomer ? 'once' : 'as often'),
        },
        {
          id: 'state',
          title: 'State',
          cell: (code) =>
            code.closedAt ? (
              <Badge kind="quiet">closed</Badge>
            ) : (
              <Button
                kind="quiet"
                small
                label="Close"
                name={`Close the code ${code.code}`}
                busy={closingId === code.id}
                onPress={() => onClose(code)}
              />
            ),
        },
      ]}
    />
  );
}

function worthOf({ percent, amountPence }: PromoCode): string {
  return percent === null ? formatMoney(amountPence ?? 0) : `${percent} %`;
}
