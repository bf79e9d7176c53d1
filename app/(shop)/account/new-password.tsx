import { useLoaderData, useLocalSearchParams } from 'expo-router';
import type { GenerateMetadataFunction } from 'expo-server';
import { View } from 'react-native';
import { AccountForm } from '#components/account/account-form.tsx';
import { ShopPage } from '#components/shop/shop-page.tsx';
import { css } from '#components/theme/css.ts';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { accountRefusalOf, useNewPassword } from '#hooks/account.ts';
import { loadFarm } from '#hooks/farm.ts';
import { pageMetadata } from '#hooks/page-metadata.ts';
import { useTitle } from '#hooks/use-title.ts';

const TITLE = 'Choose a new password · Skelderwick Farm';

export const generateMetadata: GenerateMetadataFunction = (request) =>
  pageMetadata(request, { title: TITLE, hidden: true });

export async function loader() {
  return { farm: await loadFarm() };
}

/** Where the link of the mail leads; its token is good for one new password. */
export default function NewPasswordScreen() {
  const { farm } = useLoaderData<typeof loader>();
  const { token, error } = useLocalSearchParams<{ token?: string; error?: string }>();
  useTitle(TITLE);
  return (
    <ShopPage farm={farm} narrow>
      {token && !error ? (
        <NewPassword token={token} />
      ) : (
        <EmptyState
          level={1}
          title="This link no longer works"
          words="It was used before, or it is older than an hour. Your password is as it was."
        >
          <ButtonLink href="/account/reset" label="Ask for a new link" />
        </EmptyState>
      )}
    </ShopPage>
  );
}

function NewPassword({ token }: { token: string }) {
  const change = useNewPassword(token);
  return (
    <View style={css('w-stack-l')}>
      <TitleBar title="Choose a new password" lead="Wherever you were signed in before, you are signed out then." />
      {change.isSuccess ? (
        <Notice kind="good" spoken title="Your new password is set.">
          <ButtonLink href="/account/sign-in" label="Sign in" small />
        </Notice>
      ) : (
        <AccountForm
          fields={['newPassword']}
          buttonLabel="Set the password"
          isSending={change.isPending}
          refusal={accountRefusalOf(change.error)}
          onSubmit={({ password }) => change.mutate({ password })}
        />
      )}
    </View>
  );
}
