import { View } from 'react-native';
import type { GivenFeedback } from '#shared/contracts/feedback.ts';
import { formatDay, formatDayTime } from '#shared/domain/words.ts';
import { css } from '#components/theme/css.ts';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { Table } from '#components/ui/table.tsx';
import { Text } from '#components/ui/text.tsx';

type BoxFeedback = { name: string; count: number; averageTenths: number };

/** What customers said, for the farm alone: each kind of box in one line, then every word. */
export function FeedbackList({
  boxes,
  feedback,
}: {
  boxes: readonly BoxFeedback[];
  feedback: readonly GivenFeedback[];
}) {
  if (feedback.length === 0) {
    return (
      <EmptyState
        level={3}
        title="Nothing said yet"
        words="Customers are asked on the page of an order once they have it. Only you see what they say."
      />
    );
  }
  return (
    <View style={css('w-stack')}>
      <Table
        caption="By kind of box"
        rows={boxes}
        rowKey={(box) => box.name}
        columns={[
          { id: 'box', title: 'Box', cell: (box) => box.name },
          { id: 'count', title: 'Answers', align: 'end', cell: (box) => box.count },
          {
            id: 'average',
            title: 'Average, of 5',
            align: 'end',
            cell: (box) => (box.averageTenths / 10).toFixed(1),
          },
        ]}
      />
      <View role="list" style={css('w-rows')}>
        {feedback.map((one) => (
          <View role="listitem" key={one.orderNo} style={css('w-stack-s')}>
            <Text weight="bold">{`${one.stars} of 5 · order ${one.orderNo}, ${one.name}`}</Text>
            {one.words ? <Text measure>{one.words}</Text> : null}
            <Text size="small" tone="quiet">
              {`${one.lines.join(', ')} of ${formatDay(one.day)}; said ${formatDayTime(one.changedAt)}`}
            </Text>
          </View>
        ))}
      </View>
    </View>
  );
}
