import type { ReactNode } from 'react';
import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Badge } from '#components/ui/badge.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { Table } from '#components/ui/table.tsx';
import { Text } from '#components/ui/text.tsx';
import type { Reservation } from '#shared/contracts/trade.ts';
import { shortEarTag } from '#shared/domain/ear-tag.ts';
import { formatDay, formatDayTime, formatMoney, formatRate, formatWeight } from '#shared/domain/words.ts';

const kinds = { asked: 'held', confirmed: 'free', refused: 'quiet', cancelled: 'quiet', dispatched: 'sold' } as const;

type ReservationListProps = {
  reservations: readonly Reservation[];
  /** For the farm, which sees those of all butchers. */
  withBusiness?: boolean;
  /** Where the list stands in the outline of its page. */
  level?: 2 | 3;
  /** What can be done about one of them now. */
  actionsOf: (reservation: Reservation) => ReactNode;
};

export function ReservationList({ reservations, withBusiness = false, level = 3, actionsOf }: ReservationListProps) {
  return (
    <View style={css('w-rows')}>
      {reservations.map((reservation) => (
        <View key={reservation.id} style={css('w-stack')}>
          <View style={css('w-row-between')}>
            <Heading level={level} look="sub">
              {`${reservation.reservationNo}${withBusiness ? ` ${reservation.businessName}` : ''}, for ${formatDay(reservation.day)}`}
            </Heading>
            <Badge kind={kinds[reservation.state]}>{reservation.state}</Badge>
          </View>
          <Text size="small" tone="quiet">{`Asked ${formatDayTime(reservation.createdAt)}`}</Text>
          {reservation.answer ? <Text weight="strong">{reservation.answer}</Text> : null}
          <Lines reservation={reservation} />
          {reservation.cuttingNote ? <Text>{`Cutting note: ${reservation.cuttingNote}`}</Text> : null}
          {actionsOf(reservation)}
        </View>
      ))}
    </View>
  );
}

function Lines({ reservation }: { reservation: Reservation }) {
  const { lines, totalPence, reservationNo, state } = reservation;
  const isFinal = state === 'dispatched';
  return (
    <Table
      caption={`Lines of reservation ${reservationNo}`}
      rows={lines.map((line, at) => ({ ...line, at }))}
      rowKey={(line) => String(line.at)}
      columns={[
        { id: 'name', title: 'What', cell: (line) => line.name, foot: isFinal ? 'Total' : 'About' },
        {
          id: 'from',
          title: 'From',
          cell: (line) =>
            line.earTag ? `${shortEarTag(line.earTag)}${line.side ? `, ${line.side}` : ''}` : 'any carcase',
          foot: '',
        },
        {
          id: 'grams',
          title: 'Weight',
          align: 'end',
          cell: (line) => `${formatWeight(line.chargedGrams)}${line.basis === 'cold weight' ? ' cold' : ''}`,
          foot: '',
        },
        { id: 'rate', title: 'Rate', align: 'end', cell: (line) => formatRate(line.tenthPencePerKg), foot: '' },
        {
          id: 'pence',
          title: isFinal ? 'Amount' : 'About',
          align: 'end',
          cell: (line) => formatMoney(line.linePence),
          foot: formatMoney(totalPence),
        },
      ]}
    />
  );
}
