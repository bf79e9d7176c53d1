import { useLocalSearchParams } from 'expo-router';
import { View } from 'react-native';
import { DispatchForm, type Dispatch } from '#components/trade/dispatch-form.tsx';
import { ReservationList } from '#components/trade/reservation-list.tsx';
import { css } from '#components/theme/css.ts';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useDispatchReservation, useReservations } from '#hooks/trade.ts';
import { sendForm, useContractForm } from '#hooks/use-contract-form.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { Reservation } from '#shared/contracts/trade.ts';
import { formatDay } from '#shared/domain/words.ts';

const loadDispatch = async () => (await import('#hooks/form-schemas.ts')).trade.dispatchReservationSchema.body;

export default function DispatchScreen() {
  const { reservationId } = useLocalSearchParams<{ reservationId: string }>();
  const reservations = useReservations();
  useTitle('Dispatch');
  return (
    <StateView query={reservations} what="this reservation">
      {(data) => {
        const found = data.reservations.find(({ id }) => id === reservationId);
        if (!found) return <EmptyState level={1} title="No such reservation" words="Look for it in the trade list." />;
        return (
          <View style={css('w-stack-l')}>
            <TitleBar
              back={{ href: '/office/trade', label: 'Trade' }}
              title={`Dispatch ${found.reservationNo}`}
              above={`${found.businessName} · cut ${formatDay(found.day)}`}
            />
            {found.state === 'confirmed' ? (
              <Weigh key={found.version} reservation={found} />
            ) : (
              <Gone reservation={found} />
            )}
          </View>
        );
      }}
    </StateView>
  );
}

function Weigh({ reservation }: { reservation: Reservation }) {
  const dispatch = useDispatchReservation();
  const pieces = reservation.lines.filter((line) => line.kind === 'unit');
  const form = useContractForm<Dispatch>(loadDispatch, {
    version: reservation.version,
    weights: pieces.map((line) => ({ lineId: line.id })),
    isShortAccepted: false,
  });
  const submit = sendForm(form, (body) => dispatch.mutateAsync({ params: { reservationId: reservation.id }, body }));
  return (
    <View style={css('w-stack')}>
      <DispatchForm control={form.control} reservation={reservation} onSubmit={submit} busy={dispatch.isPending} />
      <ProblemNotice error={dispatch.error} title="Nothing was dispatched." />
    </View>
  );
}

function Gone({ reservation }: { reservation: Reservation }) {
  const isDispatched = reservation.state === 'dispatched';
  return (
    <View style={css('w-stack')}>
      <Notice
        kind={isDispatched ? 'good' : 'info'}
        spoken
        title={isDispatched ? reservation.answer : `This reservation is ${reservation.state}; it cannot be dispatched.`}
      />
      <ReservationList reservations={[reservation]} level={2} actionsOf={() => null} />
    </View>
  );
}
