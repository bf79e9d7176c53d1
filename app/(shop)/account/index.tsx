import { useLoaderData, useLocalSearchParams, useRouter } from 'expo-router';
import type { GenerateMetadataFunction } from 'expo-server';
import { View } from 'react-native';
import { MyOrders } from '#components/account/my-orders.tsx';
import { AgainButton } from '#components/orders-after/again-button.tsx';
import { ListWaiting } from '#components/shop/list-waiting.tsx';
import { ShopPage } from '#components/shop/shop-page.tsx';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { loadFarm } from '#hooks/farm.ts';
import { useMe } from '#hooks/me.ts';
import { useOrderAgain } from '#hooks/order-after.ts';
import { useMyOrders } from '#hooks/orders.ts';
import { pageMetadata } from '#hooks/page-metadata.ts';
import { useSignOut } from '#hooks/use-sign-out.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { OrderSummary } from '#shared/contracts/orders.ts';

const TITLE = 'Your account · Skelderwick Farm';

export const generateMetadata: GenerateMetadataFunction = (request) =>
  pageMetadata(request, { title: TITLE, hidden: true });

export async function loader() {
  return { farm: await loadFarm() };
}

export default function AccountScreen() {
  const { farm } = useLoaderData<typeof loader>();
  const { confirmed } = useLocalSearchParams<{ confirmed?: string }>();
  const me = useMe();
  useTitle(TITLE);
  return (
    <ShopPage farm={farm} narrow>
      <View style={css('w-section')}>
        {confirmed ? <Notice kind="good" spoken title="Thank you: your address is confirmed." /> : null}
        <StateView query={me} what="your account" waiting={<ListWaiting title="Your account" rows={3} />}>
          {({ user }) => (user ? <Account name={user.name} email={user.email} /> : <SignedOut />)}
        </StateView>
      </View>
    </ShopPage>
  );
}

function SignedOut() {
  return (
    <EmptyState
      level={1}
      title="You are not signed in"
      words="You can order without an account: the link in your mail opens the order. With one you see all of your orders here."
    >
      <ButtonLink href="/account/sign-in" label="Sign in" />
      <ButtonLink href="/account/sign-up" kind="quiet" label="Open an account" />
    </EmptyState>
  );
}

function Account({ name, email }: { name: string; email: string }) {
  const orders = useMyOrders(true);
  const { signOut, isLeaving } = useSignOut();
  return (
    <View style={css('w-stack-l')}>
      <TitleBar
        title={name}
        lead={email}
        actions={<Button kind="quiet" small label="Sign out" busy={isLeaving} onPress={signOut} />}
      />
      <View>
        <TextLink href="/account/details" place="alone" icon="forward">
          Details, news and your data
        </TextLink>
        <TextLink href="/account/standing" place="alone" icon="forward">
          Standing orders
        </TextLink>
      </View>
      <View style={css('w-section')}>
        <Heading level={2}>Your orders</Heading>
        <StateView query={orders} what="your orders" waiting={<Skeleton shape="rows" count={3} />}>
          {(list) => <MyOrders orders={list.orders} again={(order) => <Again order={order} />} />}
        </StateView>
      </View>
    </View>
  );
}

function Again({ order }: { order: OrderSummary }) {
  const router = useRouter();
  const again = useOrderAgain(order.token, () => router.push('/basket'));
  return <AgainButton orderNo={order.orderNo} again={again} />;
}
