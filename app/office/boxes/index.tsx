import { View } from 'react-native';
import { BoxKindTable } from '#components/office/box-kind-table.tsx';
import { CutPriceTable } from '#components/office/cut-price-table.tsx';
import { css } from '#components/theme/css.ts';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useBoxKinds } from '#hooks/office.ts';
import { useTitle } from '#hooks/use-title.ts';

export default function BoxesScreen() {
  const boxKinds = useBoxKinds();
  useTitle('Boxes');
  return (
    <StateView query={boxKinds} what="the boxes" waiting={<Skeleton shape="rows" count={5} />}>
      {(data) => (
        <View style={css('w-stack-l')}>
          <TitleBar title="Boxes" above="Recipes, prices and what is likely to sell" />
          {data.boxKinds.length === 0 ? (
            <EmptyState title="No kind of box yet" words="The kinds of box come with the farm's first set-up." />
          ) : (
            <BoxKindTable boxKinds={data.boxKinds} />
          )}
          <View style={css('w-stack')}>
            <Heading level={2}>Cuts</Heading>
            <CutPriceTable cuts={data.cuts} />
          </View>
        </View>
      )}
    </StateView>
  );
}
