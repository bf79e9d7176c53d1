import { View } from 'react-native';
import type { StandingOrder } from '#shared/contracts/standing-orders.ts';
import { formatDay, formatDayTime, formatMoney } from '#shared/domain/words.ts';
import { css } from '#components/theme/css.ts';
import { Badge } from '#components/ui/badge.tsx';
import { Button } from '#components/ui/button.tsx';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { Text } from '#components/ui/text.tsx';

type StandingListProps = {
  standing: readonly StandingOrder[];
  busyId: string | undefined;
  onState: (standingId: string, state: 'active' | 'paused' | 'ended') => void;
};

const kinds = { pending: 'held', active: 'free', paused: 'quiet', ended: 'quiet' } as const;
const words = { pending: 'Waits for its first payment', active: 'Active', paused: 'Paused', ended: 'Ended' } as const;

/** Standing orders with their next box, and the ways to skip, pause and end. */
export function StandingList({ standing, busyId, onState }: StandingListProps) {
  return (
    <View role="list" style={css('w-rows')}>
      {standing.map((order) => (
        <View role="listitem" key={order.id} style={css('w-stack')}>
          <View style={css('w-stack-s')}>
            <Text weight="bold" size="lead">
              {`${order.quantity} × ${order.box}, every ${order.everyWeeks} weeks`}
            </Text>
            <Text size="small" tone="quiet">
              {`${order.pointName}, about ${order.time}`}
            </Text>
            <Badge kind={kinds[order.state]}>{words[order.state]}</Badge>
          </View>
          <Text>{nextWords(order)}</Text>
          <View style={css('w-buttons')}>
            {order.turn ? (
              <ButtonLink
                href={`/standing/${order.turn.token}`}
                kind="quiet"
                small
                label={order.turn.state === 'failed' ? 'Pay or skip this box' : 'See or skip this box'}
              />
            ) : null}
            <StateButtons order={order} isBusy={busyId === order.id} onState={onState} />
          </View>
        </View>
      ))}
    </View>
  );
}

type StateButtonsProps = { order: StandingOrder; isBusy: boolean; onState: StandingListProps['onState'] };

function StateButtons({ order: { id, state, box }, isBusy, onState }: StateButtonsProps) {
  if (state === 'ended') return null;
  return (
    <>
      {state === 'active' ? (
        <Button
          kind="quiet"
          small
          label="Pause"
          name={`Pause: ${box}`}
          busy={isBusy}
          onPress={() => onState(id, 'paused')}
        />
      ) : null}
      {state === 'paused' ? (
        <Button
          kind="quiet"
          small
          label="Go on"
          name={`Go on: ${box}`}
          busy={isBusy}
          onPress={() => onState(id, 'active')}
        />
      ) : null}
      <Button
        kind="danger"
        small
        label="End it"
        name={`End it: ${box}`}
        busy={isBusy}
        onPress={() => onState(id, 'ended')}
      />
    </>
  );
}

function nextWords({ state, turn, nextFrom }: StandingOrder): string {
  if (turn) {
    const amount = formatMoney(turn.totalPence);
    return turn.state === 'failed'
      ? `The card was refused for the box of ${formatDay(turn.day)}, ${amount}. It is kept until ${formatDayTime(turn.cutOffAt)}.`
      : `The box of ${formatDay(turn.day)} is kept. ${amount} is charged ${formatDayTime(turn.chargeAt)}.`;
  }
  if (state === 'active') return `The next box comes of the first cutting day from ${formatDay(nextFrom)} on.`;
  return state === 'pending' ? 'It begins once the first box is paid.' : 'No box is planned and nothing is charged.';
}
