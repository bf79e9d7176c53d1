import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Badge } from '#components/ui/badge.tsx';
import { Button } from '#components/ui/button.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { Text } from '#components/ui/text.tsx';
import type { RunSheet } from '#shared/contracts/packs.ts';
import { formatCount, formatDay, formatTime, londonDayAndTime } from '#shared/domain/words.ts';

type Slot = RunSheet['slots'][number];
export type RunSheetOrder = Slot['orders'][number];
export type Mark = 'ready' | 'collected' | 'delivered' | 'missed';

type RunSheetSlotProps = {
  slot: Slot;
  onMark: (order: RunSheetOrder, state: Mark) => void;
  /** The order whose tick is on its way. */
  markingId: string | undefined;
};

const kinds: Record<string, 'free' | 'held' | 'sold' | 'quiet'> = {
  ready: 'free',
  packed: 'held',
  confirmed: 'quiet',
  collected: 'sold',
  delivered: 'sold',
  missed: 'held',
};

/** The orders of one quarter of an hour at one place, each with its tick. */
export function RunSheetSlot({ slot, onMark, markingId }: RunSheetSlotProps) {
  const waiting = slot.orders.filter((order) => order.state !== 'collected' && order.state !== 'delivered').length;
  const { day } = londonDayAndTime(slot.startsAt);
  return (
    <View style={css('w-stack-s')}>
      <View style={css('w-row-between')}>
        <Heading level={2} look="item">{`${formatTime(slot.startsAt)} to ${formatTime(slot.endsAt)}`}</Heading>
        <Text tone="quiet">{`${slot.pointName}, ${formatDay(day)}`}</Text>
      </View>
      <Text size="small" tone="quiet">
        {waiting === 0 ? 'All handed over.' : `${formatCount(waiting, 'order')} to hand over.`}
      </Text>
      <View role="list" style={css('w-rows')}>
        {slot.orders.map((order) => (
          <View key={order.id} role="listitem" style={css('w-stack-s')}>
            <View style={css('w-row-between')}>
              <Text size="lead" weight="bold">{`${order.orderNo} ${order.name}`}</Text>
              <Badge kind={kinds[order.state] ?? 'quiet'}>{order.state}</Badge>
            </View>
            <Text>{`${order.items.join(', ')} · ${formatCount(order.packCount, 'pack')}`}</Text>
            {order.address ? <Text>{order.address}</Text> : null}
            <Marks order={order} busy={markingId === order.id} onMark={(state) => onMark(order, state)} />
          </View>
        ))}
      </View>
    </View>
  );
}

type MarksProps = { order: RunSheetOrder; busy: boolean; onMark: (state: Mark) => void };

/** Only the steps that the order can take; a wrong tick is taken back. */
function Marks({ order, busy, onMark }: MarksProps) {
  const who = `order ${order.orderNo}, ${order.name}`;
  if (order.state === 'packed') {
    return (
      <Button
        kind="quiet"
        label={order.address ? 'Put on the van' : 'Put out ready'}
        name={`${order.address ? 'Put on the van' : 'Put out ready'} ${who}`}
        busy={busy}
        onPress={() => onMark('ready')}
      />
    );
  }
  if (order.state === 'ready') {
    return (
      <View style={css('w-row')}>
        {order.address ? (
          <Button label="Delivered" name={`Delivered ${who}`} busy={busy} onPress={() => onMark('delivered')} />
        ) : (
          <Button label="Collected" name={`Collected ${who}`} busy={busy} onPress={() => onMark('collected')} />
        )}
        <Button
          kind="quiet"
          label={order.address ? 'Nobody at home' : 'Did not come'}
          name={`${order.address ? 'Nobody at home' : 'Did not come'} ${who}`}
          busy={busy}
          onPress={() => onMark('missed')}
        />
      </View>
    );
  }
  if (order.state === 'collected' || order.state === 'delivered') {
    return (
      <Button
        kind="quiet"
        small
        label="Take the tick back"
        name={`Take the tick back ${who}`}
        busy={busy}
        onPress={() => onMark('ready')}
      />
    );
  }
  if (order.state === 'missed') {
    return (
      <Button
        kind="quiet"
        label="Collected after all"
        name={`Collected after all ${who}`}
        busy={busy}
        onPress={() => onMark('collected')}
      />
    );
  }
  return <Text tone="quiet">Not packed yet.</Text>;
}
