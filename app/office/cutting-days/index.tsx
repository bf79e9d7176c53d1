import { View } from 'react-native';
import { DayTable } from '#components/carcases/day-table.tsx';
import { css } from '#components/theme/css.ts';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useCuttingDays } from '#hooks/carcases.ts';
import { useMe } from '#hooks/me.ts';
import { useTitle } from '#hooks/use-title.ts';

export default function CuttingDaysScreen() {
  const days = useCuttingDays();
  const me = useMe();
  const isOwner = me.data?.user?.role === 'owner';
  useTitle('Cutting days');
  const planOne = isOwner ? <ButtonLink href="/office/cutting-days/new" label="Plan a day" icon="plus" /> : null;
  return (
    <StateView query={days} what="the cutting days" waiting={<Skeleton shape="rows" count={4} />}>
      {(data) => (
        <View style={css('w-stack-l')}>
          <TitleBar title="Cutting days" actions={planOne} />
          {data.days.length === 0 ? (
            <EmptyState
              title="No cutting day is planned"
              words="Plan the first one; animals are then booked for it and orders taken."
            />
          ) : (
            <DayTable
              days={data.days}
              hrefOf={(dayId) => `/office/cutting-days/${dayId}${isOwner ? '' : '/packing'}`}
            />
          )}
        </View>
      )}
    </StateView>
  );
}
