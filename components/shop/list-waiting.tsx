import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';

/** A page with a title and rows, before its rows. */
export function ListWaiting({ title, rows = 4 }: { title: string; rows?: number }) {
  return (
    <View style={css('w-section')}>
      <TitleBar title={title} />
      <Skeleton shape="rows" count={rows} />
    </View>
  );
}
