import { View } from 'react-native';
import type { CuttingDaySummary } from '#shared/contracts/shop.ts';
import { formatDay, formatDayTime, formatKilograms } from '#shared/domain/words.ts';
import { Rail } from '#components/rail/rail.tsx';
import { css } from '#components/theme/css.ts';
import { Heading } from '#components/ui/heading.tsx';
import { SmallCaps } from '#components/ui/small-caps.tsx';
import { Text } from '#components/ui/text.tsx';
import { capitalised, hungWords, numberWord } from './count-words.ts';

/** What is coming and when it is ready, and the rail: how much of the day is spoken for. */
export function NextCutting({ day }: { day: CuttingDaySummary }) {
  const first = day.collectionDays[0];
  return (
    <View style={css('w-section')}>
      <View style={css('w-hero')}>
        <SmallCaps>{`${day.isInTime ? 'Next cutting' : 'Last cutting'} · ${formatDay(day.day)}`}</SmallCaps>
        <Heading level={1} look="display">
          Every cut has a place.
        </Heading>
        <Text size="lead" tone="quiet" measure>
          {`${herdWords(day)} ${first ? `Collect from ${formatDay(first)}. ` : ''}${soldWords(day)}`}
        </Text>
      </View>
      <Rail
        primals={day.rail.primals}
        narrowPrimals={day.rail.narrowPrimals}
        caption={`${formatDay(day.day)}, primal by primal: ${soldWords(day)}`}
      />
      <Text size="small" tone="quiet">
        {day.isInTime
          ? `Order, change or cancel until ${formatDayTime(day.cutOffAt)}.`
          : 'Orders for this day are closed. The next day will be shown here.'}
      </Text>
    </View>
  );
}

function herdWords({ carcaseCount, hungDays }: CuttingDaySummary): string {
  const cattle =
    carcaseCount === 1 ? 'One of our own cattle' : `${capitalised(numberWord(carcaseCount))} of our own cattle`;
  return hungDays > 0 ? `${cattle}, hung ${hungWords(hungDays)}.` : `${cattle}.`;
}

function soldWords({ soldGrams, productGrams }: CuttingDaySummary): string {
  return `${formatKilograms(soldGrams)} of ${formatKilograms(productGrams)} sold.`;
}
