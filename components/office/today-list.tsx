import type { Href } from 'expo-router';
import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Badge } from '#components/ui/badge.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { Text } from '#components/ui/text.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import type { TodayItem } from '#shared/contracts/office.ts';

/** What may go wrong for a customer when it is left lying. */
const PRESSING = new Set<TodayItem['kind']>([
  'mail failed',
  'refund failed',
  'balance failed',
  'shortfall',
  'out of date',
]);

/** What needs doing, each with the way there. */
export function TodayList({ items }: { items: readonly TodayItem[] }) {
  if (items.length === 0) {
    return (
      <EmptyState
        title="Nothing waits for you"
        words="Kill sheets, allocations, orders and mails are all up to date."
      />
    );
  }
  return (
    <View role="list" style={css('w-rows')}>
      {items.map((item) => (
        <View role="listitem" key={`${item.kind} ${item.href} ${item.title}`} style={css('w-row-between')}>
          <View style={css('w-grow', 'w-stack-s')}>
            <TextLink href={item.href as Href} place="alone" icon="forward">
              {item.title}
            </TextLink>
            <Text tone="quiet">{item.detail}</Text>
          </View>
          <Badge kind={PRESSING.has(item.kind) ? 'sold' : 'held'}>{item.kind}</Badge>
        </View>
      ))}
    </View>
  );
}
