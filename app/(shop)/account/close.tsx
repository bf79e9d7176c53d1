import { useLoaderData, useLocalSearchParams } from 'expo-router';
import type { GenerateMetadataFunction } from 'expo-server';
import { View } from 'react-native';
import { ShopPage } from '#components/shop/shop-page.tsx';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { loadFarm } from '#hooks/farm.ts';
import { useCloseAccount } from '#hooks/my-account.ts';
import { pageMetadata } from '#hooks/page-metadata.ts';
import { useTitle } from '#hooks/use-title.ts';

const TITLE = 'Close the account · Skelderwick Farm';

export const generateMetadata: GenerateMetadataFunction = (request) =>
  pageMetadata(request, { title: TITLE, hidden: true });

export async function loader() {
  return { farm: await loadFarm() };
}

/** Where the mailed link leads. Opening it closes nothing: mail scanners open every link. */
export default function CloseAccountScreen() {
  const { farm } = useLoaderData<typeof loader>();
  const { token } = useLocalSearchParams<{ token?: string }>();
  const close = useCloseAccount(token ?? '');
  useTitle(TITLE);
  return (
    <ShopPage farm={farm} narrow>
      {close.isSuccess ? (
        <EmptyState level={1} title="Your account is closed" words="Thank you for having been with us.">
          <ButtonLink href="/" kind="quiet" label="To the shop" />
        </EmptyState>
      ) : (
        <View style={css('w-stack-l')}>
          <TitleBar
            title="Close the account?"
            lead="Your details, consents and sign-in are removed at once. This cannot be taken back."
          />
          <ProblemNotice error={close.error} title="The account was not closed." />
          <View style={css('w-buttons')}>
            <Button kind="danger" label="Close it now" busy={close.isPending} onPress={() => close.mutate()} />
            <ButtonLink href="/account" kind="quiet" label="Keep the account" />
          </View>
        </View>
      )}
    </ShopPage>
  );
}
