import { useLoaderData, useLocalSearchParams } from 'expo-router';
import type { GenerateMetadataFunction, LoaderFunction } from 'expo-server';
import { useState } from 'react';
import { View } from 'react-native';
import { BoxBuy } from '#components/boxes/box-buy.tsx';
import { BoxContents } from '#components/boxes/box-contents.tsx';
import { BoxHead } from '#components/boxes/box-head.tsx';
import { BoxJsonLd } from '#components/boxes/box-json-ld.tsx';
import { SwapChoice } from '#components/boxes/swap-choice.tsx';
import { BoxWaiting } from '#components/boxes/box-waiting.tsx';
import { BoxPhotographs } from '#components/photographs/box-photographs.tsx';
import { DistanceFacts } from '#components/shop/distance-facts.tsx';
import { KeepingAdvice } from '#components/shop/keeping-advice.tsx';
import { LoadedView } from '#components/shop/loaded-view.tsx';
import { sellerWords } from '#components/shop/seller-words.ts';
import { ShopPage } from '#components/shop/shop-page.tsx';
import { css } from '#components/theme/css.ts';
import { JoinForm } from '#components/waiting-list/join-form.tsx';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { loadFarm, type Farm } from '#hooks/farm.ts';
import { load, type Loaded } from '#hooks/loaded.ts';
import { loadPhotographs } from '#hooks/photographs.ts';
import { pageMetadata } from '#hooks/page-metadata.ts';
import { useBox } from '#hooks/shop.ts';
import { chooseDay, quantityOf, setQuantity, useBasket } from '#hooks/use-basket.ts';
import { useTitle } from '#hooks/use-title.ts';
import { useJoinWaitingList } from '#hooks/waiting-list.ts';
import type { Photograph } from '#shared/contracts/photographs.ts';
import { getBox, type Box } from '#shared/contracts/shop.ts';
import { formatMoney, formatWeight } from '#shared/domain/words.ts';
import { AppError } from '#shared/errors.ts';

type Page = { farm: Farm | null; box: Loaded<Box>; photographs: Photograph[] };

export const generateMetadata: GenerateMetadataFunction = async (request, params) => {
  const box = await load(getBox, { params: { slug: String(params.slug) } });
  if (box.state !== 'ready') return pageMetadata(request, { title: 'There is no such box', hidden: true });
  return pageMetadata(request, { title: titleOf(box.data), description: describe(box.data) });
};

export const loader: LoaderFunction<Page> = async (_request, params) => {
  const slug = String(params.slug);
  const [farm, box, photographs] = await Promise.all([
    loadFarm(),
    load(getBox, { params: { slug } }),
    loadPhotographs(slug),
  ]);
  return { farm, box, photographs };
};

function titleOf(box: Box): string {
  return `${box.name} · ${formatWeight(box.guaranteedGrams)} of beef for ${formatMoney(box.pricePence)}`;
}

function describe(box: Box): string {
  return `${box.summary.replace(/\.$/, '')}. At least ${formatWeight(box.guaranteedGrams)}, about ${box.servings} servings, from our own cattle. Collect at your time.`;
}

export default function BoxScreen() {
  const { slug } = useLocalSearchParams<{ slug: string }>();
  const page = useLoaderData<typeof loader>();
  const query = useBox(slug, page.box);
  useTitle(query.data && titleOf(query.data));
  return (
    <ShopPage farm={page.farm}>
      <LoadedView
        loaded={page.box}
        query={query}
        what="this box"
        waiting={<BoxWaiting />}
        missing={{
          title: 'There is no such box',
          words: 'It may have been taken off the counter. What is coming stands on the first page.',
          children: <ButtonLink href="/" label="See the boxes" />,
        }}
      >
        {(box) => <BoxPage box={box} page={page} />}
      </LoadedView>
    </ShopPage>
  );
}

function BoxPage({ box, page: { farm, photographs } }: { box: Box; page: Page }) {
  const basket = useBasket();
  const [chosenId, setChosenId] = useState<string>();
  const [slug, setSlug] = useState(box.slug);
  // A swap costs and weighs the same: only its name and what is left of it are its own.
  const chosen = { ...box, ...box.swaps.find((swap) => swap.slug === slug) };
  const item = { kind: 'box' as const, productId: chosen.slug, name: chosen.name };
  const open = box.days.filter((day) => day.isInTime);
  const firstFree = open.find((day) => chosen.offers.some((offer) => offer.dayId === day.id && offer.free > 0));
  const basketDay = basket.items.length > 0 ? open.find((day) => day.id === basket.dayId) : undefined;
  const dayId = chosenId ?? (basketDay ?? firstFree ?? open[0])?.id;
  return (
    <View style={css('w-sections')}>
      <View style={css('w-columns', 'w-columns-side')}>
        <View style={css('w-section')}>
          <BoxHead box={box} />
          <BoxPhotographs photographs={photographs} />
          <BoxContents lines={box.lines} />
        </View>
        <View style={css('w-stay', 'w-stack')}>
          <SwapChoice box={box} dayId={dayId} slug={slug} onSlug={setSlug} />
          <BoxBuy
            box={chosen}
            dayId={dayId}
            onDay={setChosenId}
            quantity={basket.dayId === dayId ? quantityOf(basket, item) : 0}
            onQuantity={(quantity) => {
              if (dayId) chooseDay(dayId);
              setQuantity(item, quantity);
            }}
            movesFrom={basketDay && basketDay.id !== dayId ? basketDay.day : undefined}
          />
          {box.offers.some((offer) => offer.dayId === dayId && offer.free > 0) ? null : (
            <Waiting box={box} day={open.find((day) => day.id === dayId)} />
          )}
        </View>
      </View>
      <KeepingAdvice />
      <DistanceFacts seller={farm ? sellerWords(farm) : undefined} />
      <BoxJsonLd box={box} farmName={farm?.name ?? box.name} />
    </View>
  );
}

/** Sold out on the chosen day: a place on the list instead. */
function Waiting({ box, day }: { box: Box; day: { id: string; day: string } | undefined }) {
  const join = useJoinWaitingList();
  const { error } = join;
  const fields = error instanceof AppError ? error.fields : undefined;
  return (
    <JoinForm
      key={day?.id ?? 'any'}
      box={box.name}
      day={day?.day}
      isSending={join.isPending}
      sentTo={join.data?.sentTo}
      refusal={error ? { message: error.message, email: fields?.email } : undefined}
      onJoin={({ email, isAnyDay }) => join.mutate({ slug: box.slug, email, ...(isAnyDay ? {} : { dayId: day?.id }) })}
    />
  );
}
