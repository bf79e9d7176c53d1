import { useLocalSearchParams } from 'expo-router';
import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { ReservationList } from '#components/trade/reservation-list.tsx';
import { Button } from '#components/ui/button.tsx';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useCancelReservation, useMyReservations } from '#hooks/trade.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { Reservation } from '#shared/contracts/trade.ts';

const answers = {
  asked: { kind: 'held', words: 'The farm looks at it first. Until it is confirmed nothing is held for you.' },
  confirmed: { kind: 'good', words: 'It is confirmed and worked into the cutting plan.' },
  refused: { kind: 'error', words: 'It cannot be met.' },
  cancelled: { kind: 'info', words: 'It is cancelled.' },
  dispatched: { kind: 'good', words: 'It is on its way to you.' },
} as const;

export default function ReservationsScreen() {
  const { asked } = useLocalSearchParams<{ asked?: string }>();
  const reservations = useMyReservations();
  const cancel = useCancelReservation();
  useTitle('Reservations');
  const actionsOf = (reservation: Reservation) =>
    reservation.state === 'asked' || reservation.state === 'confirmed' ? (
      <View style={css('w-buttons')}>
        <Button
          kind="danger"
          small
          label="Cancel"
          name={`Cancel reservation ${reservation.reservationNo}`}
          busy={cancel.isPending && cancel.variables.params.reservationId === reservation.id}
          onPress={() =>
            cancel.mutate({ params: { reservationId: reservation.id }, body: { version: reservation.version } })
          }
        />
      </View>
    ) : null;
  return (
    <StateView query={reservations} what="your reservations" waiting={<Skeleton shape="rows" />}>
      {(data) => {
        const fresh = data.reservations.find(({ reservationNo }) => String(reservationNo) === asked);
        return (
          <View style={css('w-stack-l')}>
            <TitleBar
              title="Reservations"
              actions={<ButtonLink href="/trade/carcases" label="Reserve more" kind="quiet" />}
            />
            {fresh ? (
              <Notice
                kind={answers[fresh.state].kind}
                spoken
                title={`Reservation ${fresh.reservationNo} is ${fresh.state}.`}
                kept={fresh.answer || answers[fresh.state].words}
              />
            ) : null}
            <ProblemNotice error={cancel.error} title="The reservation was not cancelled." />
            {data.reservations.length === 0 ? (
              <EmptyState title="Nothing reserved yet" words="Choose from the coming carcases." />
            ) : (
              <ReservationList level={2} reservations={data.reservations} actionsOf={actionsOf} />
            )}
          </View>
        );
      }}
    </StateView>
  );
}
