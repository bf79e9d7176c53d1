import { useLoaderData, useLocalSearchParams } from 'expo-router';
import type { GenerateMetadataFunction, LoaderFunction } from 'expo-server';
import { View } from 'react-native';
import { ListWaiting } from '#components/shop/list-waiting.tsx';
import { LoadedView } from '#components/shop/loaded-view.tsx';
import { ShopPage } from '#components/shop/shop-page.tsx';
import { css } from '#components/theme/css.ts';
import { TraceFacts } from '#components/trace/trace-facts.tsx';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { Text } from '#components/ui/text.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { loadFarm, type Farm } from '#hooks/farm.ts';
import { load, type Loaded } from '#hooks/loaded.ts';
import { pageMetadata } from '#hooks/page-metadata.ts';
import { useTrace } from '#hooks/shop.ts';
import { useTitle } from '#hooks/use-title.ts';
import { getTrace, type Trace } from '#shared/contracts/shop.ts';
import { formatGrams } from '#shared/domain/words.ts';

type Page = { farm: Farm | null; trace: Loaded<Trace> };

const TITLE = 'Where this pack came from · Skelderwick Farm';

export const generateMetadata: GenerateMetadataFunction = (request) =>
  pageMetadata(request, { title: TITLE, hidden: true });

export const loader: LoaderFunction<Page> = async (_request, params) => {
  const [farm, trace] = await Promise.all([loadFarm(), load(getTrace, { params: { code: String(params.code) } })]);
  return { farm, trace };
};

export default function TraceScreen() {
  const { code } = useLocalSearchParams<{ code: string }>();
  const page = useLoaderData<typeof loader>();
  const query = useTrace(code, page.trace);
  useTitle(TITLE);
  return (
    <ShopPage farm={page.farm} narrow>
      <LoadedView
        loaded={page.trace}
        query={query}
        what="this pack"
        waiting={<ListWaiting title="Where it came from" rows={5} />}
        missing={{
          title: 'We know no pack with this code',
          words: 'Please read the code on the label once more: letters and figures, with its dash.',
          children: <ButtonLink href="/" kind="quiet" label="To the shop" />,
        }}
      >
        {(trace) => (
          <View style={css('w-stack-l')}>
            <TitleBar
              look="display"
              above={`Pack ${trace.code}`}
              title={trace.cut}
              lead={`${formatGrams(trace.grams)}, from one animal of our own herd.`}
            />
            <TraceFacts trace={trace} />
            <Text size="small" tone="quiet" measure>
              Keep it cold, and eat or freeze it by the use-by date on the label.
            </Text>
            <TextLink href="/" place="alone" icon="forward">
              See what is coming next
            </TextLink>
          </View>
        )}
      </LoadedView>
    </ShopPage>
  );
}
