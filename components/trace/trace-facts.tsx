import { View } from 'react-native';
import type { Trace } from '#shared/contracts/shop.ts';
import { formatEarTag } from '#shared/domain/ear-tag.ts';
import { formatDayWithYear } from '#shared/domain/words.ts';
import { css } from '#components/theme/css.ts';
import { DefinitionList } from '#components/ui/definition-list.tsx';
import { SmallCaps } from '#components/ui/small-caps.tsx';

/** From the pack back to the animal, in the order in which it happened. */
export function TraceFacts({ trace }: { trace: Trace }) {
  return (
    <View style={css('w-stack-l')}>
      <View style={css('w-stack-s')}>
        <SmallCaps level={2}>The animal</SmallCaps>
        <DefinitionList
          ruled
          facts
          items={[
            { term: 'Ear tag', value: formatEarTag(trace.earTag) },
            { term: 'Breed', value: trace.breed },
            { term: 'Age', value: `${trace.ageMonths} months` },
            { term: 'Born in', value: trace.bornIn },
            { term: 'Reared in', value: trace.rearedIn },
          ]}
        />
      </View>
      <View style={css('w-stack-s')}>
        <SmallCaps level={2}>The meat</SmallCaps>
        <DefinitionList
          ruled
          facts
          items={[
            { term: 'Slaughtered in', value: trace.slaughteredIn, note: formatDayWithYear(trace.killDay) },
            { term: 'Hung', value: `${trace.hungDays} days` },
            { term: 'Cut in', value: trace.cutIn },
            { term: 'Packed', value: formatDayWithYear(trace.packedOn) },
            { term: 'Use by', value: formatDayWithYear(trace.useBy), strong: true },
          ]}
        />
      </View>
    </View>
  );
}
