import { useState } from 'react';
import { View } from 'react-native';
import { SettleSheet, type Settlement } from '#components/allocation/settle-sheet.tsx';
import { ShortfallList } from '#components/allocation/shortfall-list.tsx';
import { TodayDays } from '#components/office/today-days.tsx';
import { TodayList } from '#components/office/today-list.tsx';
import { css } from '#components/theme/css.ts';
import { Heading } from '#components/ui/heading.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useToday } from '#hooks/office.ts';
import { useRefundShortfall, useShortfalls, useSwapShortfall } from '#hooks/shortfalls.ts';
import { useTitle } from '#hooks/use-title.ts';
import { formatDay } from '#shared/domain/words.ts';

export default function TodayScreen() {
  const today = useToday();
  useTitle('Today');
  return (
    <StateView query={today} what="what needs doing" waiting={<Skeleton shape="rows" count={5} />}>
      {(data) => (
        <View style={css('w-stack-l')}>
          <TitleBar title="Today" above={formatDay(data.today)} />
          <Shortfalls />
          <TodayList items={data.items} />
          <View style={css('w-stack')}>
            <Heading level={2}>Cutting days</Heading>
            <TodayDays days={data.days} />
          </View>
        </View>
      )}
    </StateView>
  );
}

/** Drawn only while more is sold than the beef gives. */
function Shortfalls() {
  const shortfalls = useShortfalls();
  const refund = useRefundShortfall();
  const swap = useSwapShortfall();
  const [settlement, setSettlement] = useState<Settlement>();
  const products = shortfalls.data?.products ?? [];
  const act = settlement?.offerId ? swap : refund;
  const settle = async ({ order, offerId }: Settlement) => {
    const { orderId, version, lineId, quantity } = order;
    const part = { orderId, version, lineId, quantity };
    try {
      if (offerId === null) await refund.mutateAsync(part);
      else await swap.mutateAsync({ ...part, offerId });
      setSettlement(undefined);
    } catch {
      // The mutation keeps the refusal for the sheet.
    }
  };
  const open = (next: Settlement) => {
    refund.reset();
    swap.reset();
    setSettlement(next);
  };
  if (products.length === 0) return null;
  return (
    <View role="region" aria-label="Sold beyond what there is" style={css('w-stack')}>
      <Heading level={2}>Sold beyond what there is</Heading>
      <ShortfallList
        products={products}
        busy={act.isPending}
        onRefund={(order) => open({ order, offerId: null })}
        onSwap={(order, offerId) => open({ order, offerId })}
      />
      <SettleSheet
        settlement={settlement}
        busy={act.isPending}
        error={act.error}
        onSettle={() => settlement && void settle(settlement)}
        onClose={() => setSettlement(undefined)}
      />
    </View>
  );
}
