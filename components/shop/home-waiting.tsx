import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Heading } from '#components/ui/heading.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';

/** The home page before its figures: the same places, as large as they will be. */
export function HomeWaiting() {
  return (
    <View style={css('w-sections')}>
      <View style={css('w-section')}>
        <View style={css('w-hero')}>
          <Heading level={1} look="display">
            Every cut has a place.
          </Heading>
          <Skeleton shape="lines" count={3} />
        </View>
        <Skeleton shape="rail" />
      </View>
      <View style={css('w-section')}>
        <Heading level={2}>Boxes</Heading>
        <Skeleton shape="rows" count={4} />
      </View>
    </View>
  );
}
