import { Redirect, useLoaderData } from 'expo-router';
import type { GenerateMetadataFunction } from 'expo-server';
import { View } from 'react-native';
import { ListWaiting } from '#components/shop/list-waiting.tsx';
import { ShopPage } from '#components/shop/shop-page.tsx';
import { StandingList } from '#components/standing/standing-list.tsx';
import { css } from '#components/theme/css.ts';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { loadFarm } from '#hooks/farm.ts';
import { useMe } from '#hooks/me.ts';
import { pageMetadata } from '#hooks/page-metadata.ts';
import { useMyStanding, useSetStandingState } from '#hooks/standing.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { MyStanding } from '#shared/contracts/standing-orders.ts';

const TITLE = 'Standing orders · Skelderwick Farm';

export const generateMetadata: GenerateMetadataFunction = (request) =>
  pageMetadata(request, { title: TITLE, hidden: true });

export async function loader() {
  return { farm: await loadFarm() };
}

export default function StandingScreen() {
  const { farm } = useLoaderData<typeof loader>();
  const me = useMe();
  const mine = useMyStanding(Boolean(me.data?.user));
  useTitle(TITLE);
  if (me.data?.user === null) return <Redirect href="/account/sign-in?next=/account/standing" />;
  return (
    <ShopPage farm={farm} narrow>
      <View>
        <TextLink href="/account" place="alone" icon="back">
          Your account
        </TextLink>
        <StateView query={mine} what="your standing orders" waiting={<ListWaiting title="Standing orders" rows={2} />}>
          {(data) => <Standing mine={data} />}
        </StateView>
      </View>
    </ShopPage>
  );
}

function Standing({ mine }: { mine: MyStanding }) {
  const change = useSetStandingState();
  const start = <ButtonLink href="/account/standing/start" label="Start a standing order" />;
  if (mine.standing.length === 0) {
    return (
      <EmptyState
        level={1}
        title="No standing order yet"
        words="The same box again every few weeks, with two reminders before each. Skip, pause or end it here at any time."
      >
        {start}
      </EmptyState>
    );
  }
  return (
    <View style={css('w-stack-l')}>
      <TitleBar title="Standing orders" lead="Two reminders before each box; skip, pause or end at any time." />
      <ProblemNotice error={change.error} title="Nothing was changed." />
      <StandingList
        standing={mine.standing}
        busyId={change.isPending ? change.variables.standingId : undefined}
        onState={(standingId, state) => change.mutate({ standingId, state })}
      />
      <View style={css('w-buttons')}>{start}</View>
    </View>
  );
}
