import { useLoaderData } from 'expo-router';
import type { GenerateMetadataFunction } from 'expo-server';
import { View } from 'react-native';
import { AccountForm } from '#components/account/account-form.tsx';
import { ShopPage } from '#components/shop/shop-page.tsx';
import { css } from '#components/theme/css.ts';
import { Notice } from '#components/ui/notice.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { accountRefusalOf, useSignUp } from '#hooks/account.ts';
import { loadFarm } from '#hooks/farm.ts';
import { pageMetadata } from '#hooks/page-metadata.ts';
import { useTitle } from '#hooks/use-title.ts';

const TITLE = 'Open an account · Skelderwick Farm';

export const generateMetadata: GenerateMetadataFunction = (request) =>
  pageMetadata(request, { title: TITLE, hidden: true });

export async function loader() {
  return { farm: await loadFarm() };
}

export default function SignUpScreen() {
  const { farm } = useLoaderData<typeof loader>();
  const signUp = useSignUp();
  useTitle(TITLE);
  return (
    <ShopPage farm={farm} narrow>
      <View style={css('w-stack-l')}>
        <TitleBar title="Open an account" lead="All of your orders in one place. Ordering works without one, too." />
        {signUp.isSuccess ? (
          <Notice
            kind="good"
            spoken
            title={`We wrote to ${signUp.variables.email.trim()}.`}
            next="Press the button in that mail to confirm the address; then you are signed in."
          />
        ) : (
          <AccountForm
            fields={['name', 'email', 'newPassword']}
            buttonLabel="Open the account"
            isSending={signUp.isPending}
            refusal={accountRefusalOf(signUp.error)}
            onSubmit={(values) => signUp.mutate(values)}
          >
            <TextLink href="/account/sign-in" place="alone">
              Sign in instead
            </TextLink>
          </AccountForm>
        )}
      </View>
    </ShopPage>
  );
}
