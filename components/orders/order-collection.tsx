import type { ReactNode } from 'react';
import { View } from 'react-native';
import type { Order } from '#shared/contracts/orders.ts';
import { css } from '#components/theme/css.ts';
import { DefinitionList } from '#components/ui/definition-list.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import { whenWords } from './order-words.ts';

type OrderCollectionProps = {
  order: Order;
  calendarHref: string;
  /** The way to another time, while the order can be changed. */
  change?: ReactNode;
};

/** Where, when, how to find it and what to bring, with the file for a calendar. */
export function OrderCollection({ order, calendarHref, change }: OrderCollectionProps) {
  const { collection, isDelivered } = order;
  return (
    <View style={css('w-section')}>
      <Heading level={2}>{isDelivered ? 'Bringing it' : 'Collecting it'}</Heading>
      <DefinitionList
        ruled
        facts
        items={[
          { term: 'When', value: whenWords(collection) },
          { term: 'Where', value: [collection.name, ...collection.addressLines].join(', ') },
          { term: isDelivered ? 'At the door' : 'Finding it', value: collection.directions },
          { term: isDelivered ? 'Please have' : 'Bring', value: collection.bring },
        ]}
      />
      {change}
      <TextLink href={calendarHref} place="alone" outside>
        Put it in your calendar
      </TextLink>
    </View>
  );
}
