import { View } from 'react-native';
import { RailLegend } from '#components/rail/rail-legend.tsx';
import { css } from '#components/theme/css.ts';
import { ComingCarcase, railScale } from '#components/trade/coming-carcase.tsx';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { Text } from '#components/ui/text.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useTradeDays } from '#hooks/trade.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { TradeDay } from '#shared/contracts/trade.ts';
import { formatCount, formatDay, formatDayTime } from '#shared/domain/words.ts';

export default function ComingCarcasesScreen() {
  const days = useTradeDays();
  useTitle('Coming carcases');
  return (
    <StateView query={days} what="the coming carcases" waiting={<Skeleton shape="rail" />}>
      {(data) => (
        <View style={css('w-stack-l')}>
          <TitleBar title="Coming carcases" above={`${formatCount(data.days.length, 'cutting day')} ahead`} />
          {data.days.length === 0 ? (
            <EmptyState title="No cutting day ahead" words="As soon as the farm plans one, its carcases hang here." />
          ) : (
            <>
              <RailLegend />
              {data.days.map((day) => (
                <ComingDay key={day.id} day={day} />
              ))}
            </>
          )}
        </View>
      )}
    </StateView>
  );
}

function ComingDay({ day }: { day: TradeDay }) {
  const scaleGrams = railScale(day.carcases);
  return (
    <View style={css('w-stack', 'w-ruled')}>
      <View style={css('w-row-between')}>
        <Heading level={2}>{`Cut on ${formatDay(day.day)}`}</Heading>
        <Text tone={day.isInTime ? 'quiet' : 'waiting'}>
          {day.isInTime ? `Reserve until ${formatDayTime(day.cutOffAt)}` : `Closed on ${formatDayTime(day.cutOffAt)}`}
        </Text>
      </View>
      {day.carcases.length === 0 ? <Text tone="quiet">No animal is booked for this day yet.</Text> : null}
      {day.isInTime && day.carcases.length > 0 ? (
        <View style={css('w-buttons')}>
          <ButtonLink
            href={`/trade/reserve/${day.id}`}
            label="Reserve from this day"
            name={`Reserve from this day, ${formatDay(day.day)}`}
          />
        </View>
      ) : null}
      <View style={css('w-columns')}>
        {day.carcases.map((carcase) => (
          <ComingCarcase key={carcase.id} carcase={carcase} scaleGrams={scaleGrams} />
        ))}
      </View>
    </View>
  );
}
