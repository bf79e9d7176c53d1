import { useLocalSearchParams } from 'expo-router';
import { View } from 'react-native';
import { RunSheetSlot } from '#components/collections/run-sheet-slot.tsx';
import { DayPlaces } from '#components/office/day-places.tsx';
import { css } from '#components/theme/css.ts';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useMarkOrder, useRunSheet } from '#hooks/collections.ts';
import { useMe } from '#hooks/me.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { RunSheet } from '#shared/contracts/packs.ts';
import { formatDay } from '#shared/domain/words.ts';

export default function RunSheetScreen() {
  const { dayId } = useLocalSearchParams<{ dayId: string }>();
  const sheet = useRunSheet(dayId);
  return (
    <StateView
      query={sheet}
      what="the run sheet"
      waiting={<Skeleton shape="rows" count={5} />}
      missing={{ title: 'No such cutting day', words: 'Look for it in the list of cutting days.' }}
    >
      {(data) => <Sheet sheet={data} />}
    </StateView>
  );
}

function Sheet({ sheet }: { sheet: RunSheet }) {
  const me = useMe();
  const mark = useMarkOrder();
  const orders = sheet.slots.flatMap((slot) => slot.orders);
  const collected = orders.filter((order) => order.state === 'collected' || order.state === 'delivered').length;
  useTitle(`Run sheet ${formatDay(sheet.day)}`);
  return (
    <View style={css('w-stack-l')}>
      <TitleBar title="Run sheet" above={`${formatDay(sheet.day)} · ${collected} of ${orders.length} handed over`} />
      <DayPlaces
        dayId={sheet.dayId}
        role={me.data?.user?.role ?? 'packer'}
        path={`/office/cutting-days/${sheet.dayId}/run-sheet`}
      />
      <ProblemNotice error={mark.error} title="The tick was not set." />
      {orders.length === 0 ? (
        <EmptyState title="Nobody collects" words="There is no order for this day yet." />
      ) : (
        sheet.slots
          .filter((slot) => slot.orders.length > 0)
          .map((slot) => (
            <RunSheetSlot
              key={`${slot.pointName} ${slot.startsAt}`}
              slot={slot}
              markingId={mark.isPending ? mark.variables.params.orderId : undefined}
              onMark={(order, state) =>
                mark.mutate({ params: { orderId: order.id }, body: { version: order.version, state } })
              }
            />
          ))
      )}
    </View>
  );
}
