import { View } from 'react-native';
import type { Order } from '#shared/contracts/orders.ts';
import { formatDay } from '#shared/domain/words.ts';
import { css } from '#components/theme/css.ts';
import { Text } from '#components/ui/text.tsx';
import { whenWords } from './order-words.ts';

const STOPS = ['awaiting payment', 'confirmed', 'packed', 'ready', 'collected'] as const;

/** The way of an order, stop by stop; a cancelled or missed one has left it. */
export function OrderWay({ order }: { order: Order }) {
  const state = order.state === 'delivered' ? 'collected' : order.state;
  const at = STOPS.findIndex((stop) => stop === state);
  if (at < 0 || (state === 'awaiting payment' && !order.paymentUrl)) return null;
  const stops = [
    { title: 'Ordered', words: `Order ${order.orderNo}` },
    {
      title: order.deposit?.rest === 'later' ? 'Deposit paid, and kept for you' : 'Paid and kept for you',
      words: at > 0 ? `A confirmation went to ${order.email}` : 'Waiting for the payment',
    },
    { title: 'Cut, weighed and packed', words: formatDay(order.day) },
    { title: order.isDelivered ? 'On the van' : 'Ready to collect', words: order.collection.name },
    { title: order.isDelivered ? 'Delivered' : 'Collected', words: whenWords(order.collection) },
  ];
  return (
    <ol className="w-way" aria-label="How far your order is">
      {stops.map((stop, index) => (
        <li
          key={stop.title}
          className={index <= at ? 'w-way-stop w-way-done' : index === at + 1 ? 'w-way-stop w-way-now' : 'w-way-stop'}
          {...(index === at ? { 'aria-current': 'step' as const } : {})}
        >
          <View style={css('w-way-words')}>
            <Text weight={index <= at ? 'bold' : 'normal'} tone={index <= at ? 'plain' : 'quiet'}>
              {stop.title}
            </Text>
            <Text size="small" tone="quiet">
              {stop.words}
            </Text>
          </View>
        </li>
      ))}
    </ol>
  );
}
