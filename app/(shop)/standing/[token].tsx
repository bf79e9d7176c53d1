import { useLoaderData, useLocalSearchParams } from 'expo-router';
import type { GenerateMetadataFunction, LoaderFunction } from 'expo-server';
import { View } from 'react-native';
import { ListWaiting } from '#components/shop/list-waiting.tsx';
import { LoadedView } from '#components/shop/loaded-view.tsx';
import { ShopPage } from '#components/shop/shop-page.tsx';
import { turnWords } from '#components/standing/turn-words.ts';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { loadFarm, type Farm } from '#hooks/farm.ts';
import { load, type Loaded } from '#hooks/loaded.ts';
import { pageMetadata } from '#hooks/page-metadata.ts';
import { usePayTurn, useSkipTurn, useTurn } from '#hooks/standing.ts';
import { useTitle } from '#hooks/use-title.ts';
import { getTurn, type StandingTurn } from '#shared/contracts/standing-orders.ts';
import { formatMoney } from '#shared/domain/words.ts';

const TITLE = 'Your standing order · Skelderwick Farm';

type Page = { farm: Farm | null; turn: Loaded<StandingTurn> };

export const generateMetadata: GenerateMetadataFunction = (request) =>
  pageMetadata(request, { title: TITLE, hidden: true });

export const loader: LoaderFunction<Page> = async (_request, params) => {
  const [farm, turn] = await Promise.all([loadFarm(), load(getTurn, { params: { token: String(params.token) } })]);
  return { farm, turn };
};

/** Where the reminders lead: one box, to skip it or to pay it by hand, without signing in. */
export default function TurnScreen() {
  const { token } = useLocalSearchParams<{ token: string }>();
  const page = useLoaderData<typeof loader>();
  const query = useTurn(token, page.turn);
  useTitle(TITLE);
  return (
    <ShopPage farm={page.farm} narrow>
      <LoadedView
        loaded={page.turn}
        query={query}
        what="your box"
        waiting={<ListWaiting title="Your standing order" rows={1} />}
        missing={{ title: 'This link is not known here', words: 'Please open it from the mail once more, all of it.' }}
      >
        {(turn) => <Turn turn={turn} />}
      </LoadedView>
    </ShopPage>
  );
}

function Turn({ turn }: { turn: StandingTurn }) {
  const skip = useSkipTurn(turn.token);
  const pay = usePayTurn(turn.token);
  return (
    <View style={css('w-stack-l')}>
      <View aria-live="polite">
        <TitleBar {...turnWords(turn)} />
      </View>
      <ProblemNotice error={skip.error ?? pay.error} title="That did not work." />
      <View style={css('w-buttons')}>
        {turn.state === 'failed' && turn.canSkip ? (
          <Button
            label={`Go to payment · ${formatMoney(turn.totalPence)}`}
            busy={pay.isPending || pay.isSuccess}
            onPress={() => pay.mutate()}
          />
        ) : null}
        {turn.canSkip ? (
          <Button kind="quiet" label="Skip this box" busy={skip.isPending} onPress={() => skip.mutate()} />
        ) : null}
        {turn.state === 'paid' ? (
          <ButtonLink href={`/orders/${turn.orderToken}`} kind="quiet" label="See the order" />
        ) : null}
      </View>
      <TextLink href="/account/standing" place="alone" icon="forward">
        Pause or end the standing order
      </TextLink>
    </View>
  );
}
