import { useLoaderData } from 'expo-router';
import type { GenerateMetadataFunction, LoaderFunction } from 'expo-server';
import { useState } from 'react';
import { View } from 'react-native';
import { CookingFilter, type CookingChoice } from '#components/cuts/cooking-filter.tsx';
import { CutRow } from '#components/cuts/cut-row.tsx';
import { BasketBar } from '#components/shop/basket-bar.tsx';
import { DistanceFacts } from '#components/shop/distance-facts.tsx';
import { KeepingAdvice } from '#components/shop/keeping-advice.tsx';
import { ListWaiting } from '#components/shop/list-waiting.tsx';
import { LoadedView } from '#components/shop/loaded-view.tsx';
import { nextDayOf } from '#components/shop/next-day.ts';
import { sellerWords } from '#components/shop/seller-words.ts';
import { ShopPage } from '#components/shop/shop-page.tsx';
import { css } from '#components/theme/css.ts';
import { DayChoice } from '#components/ui/day-choice.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { loadFarm, type Farm } from '#hooks/farm.ts';
import { load, type Loaded } from '#hooks/loaded.ts';
import { pageMetadata } from '#hooks/page-metadata.ts';
import { useCuts, type CutList } from '#hooks/shop.ts';
import { chooseDay, countOf, quantityOf, setQuantity, useBasket } from '#hooks/use-basket.ts';
import { useTitle } from '#hooks/use-title.ts';
import { listCuts } from '#shared/contracts/shop.ts';

type Page = { farm: Farm | null; cuts: Loaded<CutList> };

const TITLE = 'Loose cuts of beef, by the pack · Skelderwick Farm';

export const generateMetadata: GenerateMetadataFunction = (request) =>
  pageMetadata(request, {
    title: TITLE,
    description:
      'Steaks, joints, slow cuts and mince from our own cattle, priced by the kilogram. You pay the most a pack can weigh; what it weighs less is paid back.',
  });

export const loader: LoaderFunction<Page> = async () => {
  const [farm, cuts] = await Promise.all([loadFarm(), load(listCuts, {})]);
  return { farm, cuts };
};

export default function CutsScreen() {
  const page = useLoaderData<typeof loader>();
  const query = useCuts(page.cuts);
  useTitle(TITLE);
  return (
    <ShopPage farm={page.farm}>
      <LoadedView
        loaded={page.cuts}
        query={query}
        what="the loose cuts"
        waiting={<ListWaiting title="Loose cuts" rows={6} />}
      >
        {(list) => <Cuts list={list} farm={page.farm} />}
      </LoadedView>
    </ShopPage>
  );
}

function Cuts({ list, farm }: { list: CutList; farm: Farm | null }) {
  const basket = useBasket();
  const [cooking, setCooking] = useState<CookingChoice>('all');
  const [chosenId, setChosenId] = useState<string>();
  const open = list.days.filter((day) => day.isInTime);
  const basketDay = basket.items.length > 0 ? open.find((day) => day.id === basket.dayId) : undefined;
  const day = open.find((one) => one.id === chosenId) ?? basketDay ?? nextDayOf(list.days);
  const shown = list.cuts.filter((cut) => cooking === 'all' || cut.cooking === cooking);
  return (
    <View style={css('w-sections')}>
      <View style={css('w-section')}>
        <TitleBar
          look="display"
          title="Loose cuts"
          lead="Priced by the kilogram. You pay for the most that a pack can weigh; after the cutting day, what yours weighs less is paid back."
        />
        <DayChoice days={open} value={day?.id} onChange={setChosenId} />
        <CookingFilter cuts={list.cuts} value={cooking} onChange={setCooking} />
        {shown.length > 0 ? (
          <View role="list" style={css('w-goods', 'w-cuts')}>
            {shown.map((cut) => {
              const item = { kind: 'loose' as const, productId: cut.id, name: cut.name };
              return (
                <CutRow
                  key={cut.id}
                  cut={cut}
                  dayId={day?.id}
                  open={day?.isInTime ?? false}
                  quantity={basket.dayId === day?.id ? quantityOf(basket, item) : 0}
                  onQuantity={(quantity) => {
                    if (day) chooseDay(day.id);
                    setQuantity(item, quantity);
                  }}
                />
              );
            })}
          </View>
        ) : (
          <EmptyState
            title="No loose cuts just now"
            words="They are put on the counter with the boxes, as soon as a cutting day is planned."
          />
        )}
      </View>
      <KeepingAdvice />
      <DistanceFacts seller={farm ? sellerWords(farm) : undefined} />
      <BasketBar count={countOf(basket)} />
    </View>
  );
}
