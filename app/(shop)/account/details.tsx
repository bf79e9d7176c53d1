import { Redirect, useLoaderData } from 'expo-router';
import type { GenerateMetadataFunction } from 'expo-server';
import { View } from 'react-native';
import { Closing } from '#components/account/closing.tsx';
import { DetailsForm } from '#components/account/details-form.tsx';
import { NewsChoice } from '#components/account/news-choice.tsx';
import { ListWaiting } from '#components/shop/list-waiting.tsx';
import { ShopPage } from '#components/shop/shop-page.tsx';
import { css } from '#components/theme/css.ts';
import { Heading } from '#components/ui/heading.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { Text } from '#components/ui/text.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { loadFarm } from '#hooks/farm.ts';
import { useMe } from '#hooks/me.ts';
import { useAskClosing, useEditMyDetails, useMyDetails, useSetMyNews } from '#hooks/my-account.ts';
import { pageMetadata } from '#hooks/page-metadata.ts';
import { sendForm, useContractForm } from '#hooks/use-contract-form.ts';
import { useTitle } from '#hooks/use-title.ts';
import { getMyData, type MyDetails, type MyDetailsEdit } from '#shared/contracts/account.ts';

const TITLE = 'Your details · Skelderwick Farm';
const loadSchema = async () => (await import('#hooks/form-schemas.ts')).account.MyDetailsEdit;

export const generateMetadata: GenerateMetadataFunction = (request) =>
  pageMetadata(request, { title: TITLE, hidden: true });

export async function loader() {
  return { farm: await loadFarm() };
}

export default function DetailsScreen() {
  const { farm } = useLoaderData<typeof loader>();
  const me = useMe();
  const details = useMyDetails(Boolean(me.data?.user));
  useTitle(TITLE);
  if (me.data?.user === null) return <Redirect href="/account/sign-in?next=/account/details" />;
  return (
    <ShopPage farm={farm} narrow>
      <StateView query={details} what="your details" waiting={<ListWaiting title="Your details" rows={4} />}>
        {(data) => <Details details={data} isCustomer={me.data?.user?.role === 'customer'} />}
      </StateView>
    </ShopPage>
  );
}

function Details({ details, isCustomer }: { details: MyDetails; isCustomer: boolean }) {
  const news = useSetMyNews();
  const closing = useAskClosing();
  return (
    <View style={css('w-stack-l')}>
      <TitleBar back={{ href: '/account', label: 'Your account' }} title="Your details" lead={details.email} />
      <Edit details={details} />
      <View style={css('w-section')}>
        <Heading level={2}>News by e-mail</Heading>
        <NewsChoice news={details.news} isSaving={news.isPending} onChange={(isGiven) => news.mutate(isGiven)} />
        <ProblemNotice error={news.error} title="This was not saved." />
      </View>
      <View style={css('w-section')}>
        <Heading level={2}>Your data</Heading>
        <Text tone="quiet" measure>
          Everything that we keep about you, in one file that other programs can read.
        </Text>
        <TextLink href={getMyData.path} place="alone" outside>
          Download my data
        </TextLink>
      </View>
      {isCustomer ? (
        <View style={css('w-section')}>
          <Heading level={2}>Closing the account</Heading>
          <Closing
            onAsk={() => closing.mutate()}
            isAsking={closing.isPending}
            sentTo={closing.data?.sentTo}
            refusal={closing.error?.message}
          />
        </View>
      ) : null}
    </View>
  );
}

function Edit({ details }: { details: MyDetails }) {
  const edit = useEditMyDetails();
  const form = useContractForm<MyDetailsEdit>(loadSchema, { name: details.name, phone: details.phone });
  const submit = sendForm(form, (body) => edit.mutateAsync(body));
  return (
    <View style={css('w-stack')}>
      {edit.isSuccess ? <Notice kind="good" spoken title="Saved." /> : null}
      <DetailsForm control={form.control} onSubmit={submit} busy={edit.isPending} />
      <ProblemNotice error={edit.error} title="Your details were not saved." />
    </View>
  );
}
