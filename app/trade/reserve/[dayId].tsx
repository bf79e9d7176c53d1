import { router, useLocalSearchParams } from 'expo-router';
import { useState } from 'react';
import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { ReserveForm } from '#components/trade/reserve-form.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useReserve, useTradeDays } from '#hooks/trade.ts';
import { sendForm, useContractForm } from '#hooks/use-contract-form.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { NewReservation, TradeDay } from '#shared/contracts/trade.ts';
import { formatDay, formatDayTime } from '#shared/domain/words.ts';

const loadSchema = async () => (await import('#hooks/form-schemas.ts')).trade.NewReservation;

export default function ReserveScreen() {
  const { dayId } = useLocalSearchParams<{ dayId: string }>();
  const days = useTradeDays();
  return (
    <StateView query={days} what="this cutting day" waiting={<Skeleton shape="rows" />}>
      {(data) => {
        const day = data.days.find(({ id }) => id === dayId);
        if (!day?.isInTime) {
          return (
            <EmptyState
              level={1}
              title={day ? 'Too late for this day' : 'No such cutting day'}
              words={day ? `Reservations closed on ${formatDayTime(day.cutOffAt)}.` : 'It may be over already.'}
            >
              <TextLink href="/trade/carcases" place="alone" icon="back">
                Coming carcases
              </TextLink>
            </EmptyState>
          );
        }
        return <Reserve day={day} />;
      }}
    </StateView>
  );
}

function Reserve({ day }: { day: TradeDay }) {
  const reserve = useReserve();
  // One key for this visit: a second press of the button finds the first reservation.
  const [requestKey] = useState(() => crypto.randomUUID());
  const form = useContractForm<NewReservation>(loadSchema, { requestKey, dayId: day.id, lines: [], cuttingNote: '' });
  useTitle(`Reserve, ${formatDay(day.day)}`);
  const submit = sendForm(form, async (body) => {
    const { reservationNo } = await reserve.mutateAsync(body);
    router.push(`/trade/reservations?asked=${reservationNo}`);
  });
  return (
    <View style={css('w-stack-l')}>
      <TitleBar
        back={{ href: '/trade/carcases', label: 'Coming carcases' }}
        title={`Reserve from ${formatDay(day.day)}`}
        above={`Until ${formatDayTime(day.cutOffAt)}`}
        lead="What is sold or held by others cannot be taken. The plan is worked out again with your list."
      />
      <ReserveForm control={form.control} day={day} onSubmit={submit} busy={reserve.isPending} />
      <ProblemNotice error={reserve.error} title="Nothing was reserved." />
    </View>
  );
}
