import { useLoaderData, useLocalSearchParams, useRouter, type Href } from 'expo-router';
import type { GenerateMetadataFunction } from 'expo-server';
import { View } from 'react-native';
import { AccountForm } from '#components/account/account-form.tsx';
import { ShopPage } from '#components/shop/shop-page.tsx';
import { css } from '#components/theme/css.ts';
import { TextLink } from '#components/ui/text-link.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { accountRefusalOf, placeAfterSignIn, useSignIn } from '#hooks/account.ts';
import { loadFarm } from '#hooks/farm.ts';
import { pageMetadata } from '#hooks/page-metadata.ts';
import { useTitle } from '#hooks/use-title.ts';

const TITLE = 'Sign in · Skelderwick Farm';

export const generateMetadata: GenerateMetadataFunction = (request) =>
  pageMetadata(request, { title: TITLE, hidden: true });

export async function loader() {
  return { farm: await loadFarm() };
}

export default function SignInScreen() {
  const { farm } = useLoaderData<typeof loader>();
  const { next } = useLocalSearchParams<{ next?: string }>();
  const router = useRouter();
  const signIn = useSignIn();
  useTitle(TITLE);
  return (
    <ShopPage farm={farm} narrow>
      <View style={css('w-stack-l')}>
        <TitleBar title="Sign in" lead="For customers, butchers and the farm alike." />
        <AccountForm
          fields={['username', 'password']}
          buttonLabel="Sign in"
          isSending={signIn.isPending || signIn.isSuccess}
          refusal={accountRefusalOf(signIn.error)}
          onSubmit={({ email, password }) =>
            signIn.mutate(
              { email, password },
              { onSuccess: (role) => router.replace(placeAfterSignIn(next, role) as Href) },
            )
          }
        >
          <TextLink href="/account/reset" place="alone">
            Choose a new password
          </TextLink>
          <TextLink href="/account/sign-up" place="alone">
            Open an account
          </TextLink>
        </AccountForm>
      </View>
    </ShopPage>
  );
}
