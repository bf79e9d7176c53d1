import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Skeleton } from '#components/ui/skeleton.tsx';

/** A box before its figures. */
export function BoxWaiting() {
  return (
    <View style={css('w-section')}>
      <Skeleton shape="lines" count={4} />
      <Skeleton shape="rail" />
      <Skeleton shape="rows" count={4} />
    </View>
  );
}
