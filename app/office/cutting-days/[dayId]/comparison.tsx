import { useLocalSearchParams } from 'expo-router';
import { View } from 'react-native';
import { DayPlaces } from '#components/office/day-places.tsx';
import { ComparisonTable } from '#components/specifications/comparison-table.tsx';
import { css } from '#components/theme/css.ts';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { Text } from '#components/ui/text.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useDayComparison } from '#hooks/specifications.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { DayComparison } from '#shared/contracts/specifications.ts';
import { formatDay } from '#shared/domain/words.ts';

export default function ComparisonScreen() {
  const { dayId } = useLocalSearchParams<{ dayId: string }>();
  const comparison = useDayComparison(dayId);
  return (
    <StateView
      query={comparison}
      what="what was weighed"
      waiting={<Skeleton shape="rows" count={5} />}
      missing={{ title: 'No such cutting day', words: 'Look for it in the list of cutting days.' }}
    >
      {(data) => <Ready comparison={data} />}
    </StateView>
  );
}

function Ready({ comparison }: { comparison: DayComparison }) {
  const { dayId, day, state, specificationId, specificationName, carcases, pooled } = comparison;
  useTitle(`Foreseen and weighed ${formatDay(day)}`);
  return (
    <View style={css('w-stack-l')}>
      <TitleBar title="Foreseen and weighed" above={`${formatDay(day)} · ${specificationName}`} />
      <DayPlaces dayId={dayId} role="owner" path={`/office/cutting-days/${dayId}/comparison`} />
      {pooled.length === 0 ? (
        <EmptyState
          title="Nothing is weighed yet"
          words="Weigh packs, or the parts of a carcase on its own page: they stand here beside what was foreseen."
        />
      ) : (
        <>
          <Text tone="quiet" measure>
            Packs of a cut are held against all lines that give it; a cut that partly went into mince is left out, and
            so is what was not weighed.
          </Text>
          <ComparisonTable caption="All carcases together" cuts={pooled} />
          {carcases.length > 1
            ? carcases.map(({ id, earTag, title, cuts }) => (
                <ComparisonTable key={id} caption={`${title} ${earTag}`} cuts={cuts} />
              ))
            : null}
        </>
      )}
      {state === 'closed' ? (
        <View style={css('w-buttons')}>
          <ButtonLink href={`/office/specifications/${specificationId}/learning`} label="See what this proposes" />
        </View>
      ) : (
        <Notice kind="info" title="Nothing is proposed until this day is closed." />
      )}
    </View>
  );
}
