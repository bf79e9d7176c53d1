import { View } from 'react-native';
import type { CuttingDaySummary } from '#shared/contracts/shop.ts';
import { formatDay, formatKilograms } from '#shared/domain/words.ts';
import { css } from '#components/theme/css.ts';
import { SmallCaps } from '#components/ui/small-caps.tsx';
import { Text } from '#components/ui/text.tsx';

/** The days after the next one: they can be ordered for as well, on the page of each box. */
export function LaterDays({ days }: { days: readonly CuttingDaySummary[] }) {
  if (days.length === 0) return null;
  return (
    <View style={css('w-stack-s')}>
      <SmallCaps level={3}>After that</SmallCaps>
      {days.map((day) => (
        <Text key={day.id} tone="quiet" figures>
          {`${formatDay(day.day)}: ${formatKilograms(day.productGrams - day.soldGrams)} of ${formatKilograms(day.productGrams)} still to be had${collectWords(day)}`}
        </Text>
      ))}
    </View>
  );
}

function collectWords({ collectionDays }: CuttingDaySummary): string {
  return collectionDays[0] ? `, to collect from ${formatDay(collectionDays[0])}.` : '.';
}
