import { useLocalSearchParams } from 'expo-router';
import type { GenerateMetadataFunction } from 'expo-server';
import { useState } from 'react';
import { View } from 'react-native';
import { AddList, type Addable } from '#components/orders/add-list.tsx';
import { ListWaiting } from '#components/shop/list-waiting.tsx';
import { ShopPage } from '#components/shop/shop-page.tsx';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { Text } from '#components/ui/text.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useAddToOrder } from '#hooks/order-changes.ts';
import { refusalOf, useOpenOrder } from '#hooks/orders.ts';
import { pageMetadata } from '#hooks/page-metadata.ts';
import { cutsQuery, homeQuery, type CutList } from '#hooks/shop.ts';
import { usePageReturn } from '#hooks/use-page-return.ts';
import { useTitle } from '#hooks/use-title.ts';
import { useQuery } from '@tanstack/react-query';
import type { Order } from '#shared/contracts/orders.ts';
import type { DayOffer, ShopHome } from '#shared/contracts/shop.ts';
import { formatDay, formatMoney, formatWeight } from '#shared/domain/words.ts';

const TITLE = 'Add to your order · Skelderwick Farm';

export const generateMetadata: GenerateMetadataFunction = (request) =>
  pageMetadata(request, { title: TITLE, hidden: true });

export default function AddScreen() {
  const { token } = useLocalSearchParams<{ token: string }>();
  const order = useOpenOrder(token);
  const home = useQuery(homeQuery());
  const cuts = useQuery(cutsQuery());
  useTitle(TITLE);
  const data =
    order.data && home.data && cuts.data ? { order: order.data, home: home.data, cuts: cuts.data } : undefined;
  const error = order.error ?? home.error ?? cuts.error;
  const refetch = () => Promise.all([order.refetch(), home.refetch(), cuts.refetch()]);
  return (
    <ShopPage farm={home.data?.farm ?? null} narrow>
      <StateView
        query={{ data, error, refetch }}
        what="what can be added"
        waiting={<ListWaiting title="Add to your order" rows={5} />}
      >
        {(ready) => <Adding {...ready} />}
      </StateView>
    </ShopPage>
  );
}

function Adding({ order, home, cuts }: { order: Order; home: ShopHome; cuts: CutList }) {
  const add = useAddToOrder(order.token);
  const [chosen, setChosen] = useState<Record<string, number>>({});
  usePageReturn(add.reset);
  const boxes = boxesOf(home, order.dayId);
  const packs = packsOf(cuts, order.dayId);
  const lines = Object.entries(chosen).flatMap(([offerId, quantity]) => (quantity > 0 ? [{ offerId, quantity }] : []));
  const prices = new Map([...boxes, ...packs].map((item) => [item.offerId, item.pricePence]));
  const sumPence = lines.reduce((sum, line) => sum + line.quantity * (prices.get(line.offerId) ?? 0), 0);
  const list = {
    quantityOf: (offerId: string) => chosen[offerId] ?? 0,
    onQuantity: (offerId: string, quantity: number) => setChosen((before) => ({ ...before, [offerId]: quantity })),
  };
  const back = (
    <TextLink href={`/orders/${order.token}`} place="alone" tone="ink" icon="back">
      {`Order ${order.orderNo}`}
    </TextLink>
  );
  if (!order.canChange || boxes.length + packs.length === 0) return <Nothing order={order} />;
  const refusal = refusalOf(add.error);
  return (
    <View style={css('w-stack-l')}>
      <View style={css('w-section')}>
        {back}
        <TitleBar title="Add to your order" lead={`What is still there for ${formatDay(order.day)}.`} />
      </View>
      <AddList title="Boxes" items={boxes} {...list} />
      <AddList title="Loose cuts" items={packs} {...list} />
      {refusal ? <Notice kind="error" title={refusal.message} /> : null}
      <View style={css('w-stack-s')}>
        <Text size="small" tone="quiet">
          You pay the difference on the next page, by card. What you have ordered already stays as it is.
        </Text>
        <Button
          wide
          label={lines.length > 0 ? `Go to payment · ${formatMoney(sumPence)}` : 'Choose what to add'}
          disabled={lines.length === 0}
          busy={add.isPending || add.isSuccess}
          busyLabel="Keeping it for you …"
          onPress={() => add.mutate({ version: order.version, lines }, { onSuccess: goOn })}
        />
      </View>
    </View>
  );
}

/** To the payment company's page; where nothing is to be paid, back to the order. */
function goOn({ addition, token }: Order): void {
  window.location.assign(addition?.paymentUrl ?? `/orders/${token}`);
}

function Nothing({ order }: { order: Order }) {
  return (
    <EmptyState
      level={1}
      title={order.canChange ? 'Nothing is left to add' : 'This order cannot be added to any more'}
      words={
        order.canChange
          ? `All that was on sale for ${formatDay(order.day)} has gone.`
          : 'Either its cut-off has passed or it is not paid.'
      }
    >
      <ButtonLink href={`/orders/${order.token}`} label="Back to the order" />
    </EmptyState>
  );
}

function boxesOf({ boxes }: ShopHome, dayId: string): Addable[] {
  return boxes.flatMap((box) =>
    [box, ...box.swaps].flatMap(({ name, offers }) => {
      const note = `at least ${formatWeight(box.guaranteedGrams)}`;
      return freeOf(offers, dayId).map((offer) => ({ ...offer, name, note, pricePence: box.pricePence }));
    }),
  );
}

function packsOf({ cuts }: CutList, dayId: string): Addable[] {
  return cuts.flatMap(({ name, offers, upperGrams, pricePence }) =>
    freeOf(offers, dayId).map((offer) => ({ ...offer, name, note: `up to ${formatWeight(upperGrams)}`, pricePence })),
  );
}

function freeOf(offers: readonly DayOffer[], dayId: string): { offerId: string; free: number }[] {
  return offers.filter((offer) => offer.dayId === dayId && offer.free > 0);
}
