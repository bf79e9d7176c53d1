import { View } from 'react-native';
import { TodayDays } from '#components/office/today-days.tsx';
import { TodayList } from '#components/office/today-list.tsx';
import { css } from '#components/theme/css.ts';
import { Heading } from '#components/ui/heading.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useToday } from '#hooks/office.ts';
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
