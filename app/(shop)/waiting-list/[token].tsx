import { useLoaderData, useLocalSearchParams, useRouter } from 'expo-router';
import type { GenerateMetadataFunction, LoaderFunction } from 'expo-server';
import { View } from 'react-native';
import { ListWaiting } from '#components/shop/list-waiting.tsx';
import { LoadedView } from '#components/shop/loaded-view.tsx';
import { ShopPage } from '#components/shop/shop-page.tsx';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { placeWords } from '#components/waiting-list/place-words.ts';
import { loadFarm, type Farm } from '#hooks/farm.ts';
import { load, type Loaded } from '#hooks/loaded.ts';
import { pageMetadata } from '#hooks/page-metadata.ts';
import { fillBasket, noteKept } from '#hooks/use-basket.ts';
import { useTitle } from '#hooks/use-title.ts';
import { useChangePlace, useWaitingPlace } from '#hooks/waiting-list.ts';
import { getWaitingPlace, type WaitingPlace } from '#shared/contracts/waiting-list.ts';

const TITLE = 'Waiting list · Skelderwick Farm';

type Page = { farm: Farm | null; place: Loaded<WaitingPlace> };

export const generateMetadata: GenerateMetadataFunction = (request) =>
  pageMetadata(request, { title: TITLE, hidden: true });

export const loader: LoaderFunction<Page> = async (_request, params) => {
  const [farm, place] = await Promise.all([
    loadFarm(),
    load(getWaitingPlace, { params: { token: String(params.token) } }),
  ]);
  return { farm, place };
};

/** Where the mails of the list lead: to say yes, to take the box that is kept, to give the place up. */
export default function WaitingPlaceScreen() {
  const { token } = useLocalSearchParams<{ token: string }>();
  const page = useLoaderData<typeof loader>();
  const query = useWaitingPlace(token, page.place);
  useTitle(TITLE);
  return (
    <ShopPage farm={page.farm} narrow>
      <LoadedView
        loaded={page.place}
        query={query}
        what="your place"
        waiting={<ListWaiting title="Waiting list" rows={1} />}
        missing={{ title: 'This link is not known here', words: 'Please open it from the mail once more, all of it.' }}
      >
        {(place) => <Place token={token} place={place} />}
      </LoadedView>
    </ShopPage>
  );
}

function Place({ token, place }: { token: string; place: WaitingPlace }) {
  const confirm = useChangePlace(token, 'confirm');
  const leave = useChangePlace(token, 'leave');
  const router = useRouter();
  const { state, kept, slug, box } = place;
  const isLive = state === 'unconfirmed' || state === 'waiting' || state === 'offered';
  const take = (dayId: string) => {
    fillBasket(dayId, [{ kind: 'box', productId: slug, name: box, quantity: 1 }]);
    noteKept(token);
    router.push('/basket');
  };
  return (
    <View style={css('w-stack-l')}>
      <View aria-live="polite">
        <TitleBar {...placeWords(place)} />
      </View>
      <ProblemNotice error={confirm.error ?? leave.error} title="That did not work." />
      <View style={css('w-buttons')}>
        {state === 'unconfirmed' ? (
          <Button label="Yes, put me on the list" busy={confirm.isPending} onPress={() => confirm.mutate()} />
        ) : null}
        {state === 'offered' && kept ? (
          <Button label="Put it into the basket" icon="forward" onPress={() => take(kept.dayId)} />
        ) : null}
        {isLive ? (
          <Button kind="quiet" label="Give up my place" busy={leave.isPending} onPress={() => leave.mutate()} />
        ) : (
          <ButtonLink href={`/boxes/${slug}`} kind="quiet" label={`To ${box}`} />
        )}
      </View>
    </View>
  );
}
