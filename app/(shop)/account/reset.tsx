import { useLoaderData } from 'expo-router';
import type { GenerateMetadataFunction } from 'expo-server';
import { View } from 'react-native';
import { AccountForm } from '#components/account/account-form.tsx';
import { ShopPage } from '#components/shop/shop-page.tsx';
import { css } from '#components/theme/css.ts';
import { Notice } from '#components/ui/notice.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { accountRefusalOf, useAskReset } from '#hooks/account.ts';
import { loadFarm } from '#hooks/farm.ts';
import { pageMetadata } from '#hooks/page-metadata.ts';
import { useTitle } from '#hooks/use-title.ts';

const TITLE = 'A new password · Skelderwick Farm';

export const generateMetadata: GenerateMetadataFunction = (request) =>
  pageMetadata(request, { title: TITLE, hidden: true });

export async function loader() {
  return { farm: await loadFarm() };
}

export default function ResetScreen() {
  const { farm } = useLoaderData<typeof loader>();
  const ask = useAskReset();
  useTitle(TITLE);
  return (
    <ShopPage farm={farm} narrow>
      <View style={css('w-stack-l')}>
        <TitleBar
          title="A new password"
          lead="Give the address of your account; we send a link that works for an hour."
        />
        {ask.isSuccess ? (
          <Notice
            kind="good"
            spoken
            title={`If ${ask.variables.email.trim()} has an account, a mail is on its way.`}
            next="Press the button in it to choose a new password."
          />
        ) : (
          <AccountForm
            fields={['username']}
            buttonLabel="Send the link"
            isSending={ask.isPending}
            refusal={accountRefusalOf(ask.error)}
            onSubmit={({ email }) => ask.mutate({ email })}
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
