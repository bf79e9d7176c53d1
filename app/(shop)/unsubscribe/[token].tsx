import { useLoaderData, useLocalSearchParams } from 'expo-router';
import type { GenerateMetadataFunction, LoaderFunction } from 'expo-server';
import { View } from 'react-native';
import { ListWaiting } from '#components/shop/list-waiting.tsx';
import { LoadedView } from '#components/shop/loaded-view.tsx';
import { ShopPage } from '#components/shop/shop-page.tsx';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { loadFarm, type Farm } from '#hooks/farm.ts';
import { load, type Loaded } from '#hooks/loaded.ts';
import { useSubscription, useUnsubscribe } from '#hooks/my-account.ts';
import { pageMetadata } from '#hooks/page-metadata.ts';
import { useTitle } from '#hooks/use-title.ts';
import { getSubscription, type Subscription } from '#shared/contracts/account.ts';

const TITLE = 'Stop these mails · Skelderwick Farm';

type Page = { farm: Farm | null; subscription: Loaded<Subscription> };

export const generateMetadata: GenerateMetadataFunction = (request) =>
  pageMetadata(request, { title: TITLE, hidden: true });

export const loader: LoaderFunction<Page> = async (_request, params) => {
  const [farm, subscription] = await Promise.all([
    loadFarm(),
    load(getSubscription, { params: { token: String(params.token) } }),
  ]);
  return { farm, subscription };
};

/** One press ends marketing mail; nobody needs an account or a password for it. */
export default function UnsubscribeScreen() {
  const { token } = useLocalSearchParams<{ token: string }>();
  const page = useLoaderData<typeof loader>();
  const query = useSubscription(token, page.subscription);
  useTitle(TITLE);
  return (
    <ShopPage farm={page.farm} narrow>
      <LoadedView
        loaded={page.subscription}
        query={query}
        what="your mails"
        waiting={<ListWaiting title="Stop these mails" rows={1} />}
        missing={{
          title: 'This link is not known here',
          words: 'Please open it from the mail once more, all of it.',
        }}
      >
        {(subscription) => <Choice token={token} subscription={subscription} />}
      </LoadedView>
    </ShopPage>
  );
}

function Choice({ token, subscription }: { token: string; subscription: Subscription }) {
  const stop = useUnsubscribe(token);
  if (!subscription.isSubscribed) {
    return (
      <EmptyState
        level={1}
        title="No more such mails"
        words={`${subscription.email} gets mails about its own orders, and nothing else from us.`}
      >
        <ButtonLink href="/" kind="quiet" label="To the shop" />
      </EmptyState>
    );
  }
  return (
    <View style={css('w-stack-l')}>
      <TitleBar
        title="Stop these mails?"
        lead={`We write to ${subscription.email} when it may be time to order again. Mails about orders come in any case.`}
      />
      <ProblemNotice error={stop.error} title="That did not work: the mails go on for now." />
      <View style={css('w-buttons')}>
        <Button label="Stop these mails" busy={stop.isPending} onPress={() => stop.mutate()} />
      </View>
    </View>
  );
}
