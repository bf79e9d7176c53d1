import { useLoaderData } from 'expo-router';
import type { GenerateMetadataFunction } from 'expo-server';
import { useEffect } from 'react';
import { View } from 'react-native';
import { BasketItemRow } from '#components/basket/basket-item.tsx';
import { BasketSum } from '#components/basket/basket-sum.tsx';
import { NoDayOpen } from '#components/basket/no-day-open.tsx';
import { WaitingOrder } from '#components/basket/waiting-order.tsx';
import { ListWaiting } from '#components/shop/list-waiting.tsx';
import { ShopPage } from '#components/shop/shop-page.tsx';
import { css } from '#components/theme/css.ts';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { DayChoice } from '#components/ui/day-choice.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useBasketOrder } from '#hooks/basket-lines.ts';
import { loadCounter, useCounter } from '#hooks/counter.ts';
import { useLeavePayment } from '#hooks/order-changes.ts';
import { useOpenOrder } from '#hooks/orders.ts';
import { pageMetadata } from '#hooks/page-metadata.ts';
import type { CutList } from '#hooks/shop.ts';
import { chooseDay, setQuantity, settleOrder, useBasket, useIsBasketRead } from '#hooks/use-basket.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { ShopHome } from '#shared/contracts/shop.ts';

const TITLE = 'Your basket · Skelderwick Farm';

export const generateMetadata: GenerateMetadataFunction = (request) =>
  pageMetadata(request, { title: TITLE, hidden: true });

export const loader = loadCounter;

export default function BasketScreen() {
  const counter = useCounter(useLoaderData<typeof loader>());
  const basket = useBasket();
  const isRead = useIsBasketRead();
  useTitle(TITLE);
  const waiting = <ListWaiting title="Your basket" rows={3} />;
  return (
    <ShopPage farm={counter.farm} narrow>
      {!isRead ? (
        waiting
      ) : basket.items.length === 0 ? (
        <EmptyState
          level={1}
          title="Your basket is empty"
          words="Boxes and loose cuts that you choose are kept here, also when you close the page."
        >
          <ButtonLink href="/" label="See the boxes" />
          <ButtonLink href="/cuts" kind="quiet" label="See the loose cuts" />
        </EmptyState>
      ) : (
        <StateView query={counter} what="what is on the counter" waiting={waiting}>
          {(data) => <Basket {...data} />}
        </StateView>
      )}
    </ShopPage>
  );
}

function Basket({ home, cuts }: { home: ShopHome; cuts: CutList }) {
  const basket = useBasket();
  const { day, items, totalPence, isRight, error, refetch } = useBasketOrder(basket, { home, cuts });
  if (!day) return <NoDayOpen />;
  return (
    <View style={css('w-section')}>
      <TitleBar title="Your basket" />
      {basket.orderToken ? <OpenOrder token={basket.orderToken} /> : null}
      <DayChoice label="For which cutting day?" days={openDays(home)} value={day.id} onChange={chooseDay} />
      <StateView query={{ data: items, error, refetch }} what="the prices">
        {() => (
          <View role="list" style={css('w-rows-plain')}>
            {items.map((item) => (
              <BasketItemRow
                key={`${item.kind} ${item.productId}`}
                name={item.name}
                quantity={item.quantity}
                line={item.line}
                elsewhere={item.elsewhere.map((offer) => ({ ...offer, id: offer.dayId }))[0]}
                onQuantity={(quantity) => setQuantity(item, quantity)}
                onDay={chooseDay}
              />
            ))}
          </View>
        )}
      </StateView>
      <BasketSum day={day} totalPence={totalPence} isRight={isRight} />
      <TextLink href="/cuts" place="alone" icon="forward">
        Add loose cuts
      </TextLink>
    </View>
  );
}

function openDays({ days }: ShopHome) {
  return days.filter((day) => day.isInTime);
}

/** Asks how the order of this basket stands: another tab, or the payment company, may have ended it. */
function OpenOrder({ token }: { token: string }) {
  const { data: order } = useOpenOrder(token);
  const leave = useLeavePayment(token);
  const state = order?.state;
  useEffect(() => {
    if (state && state !== 'awaiting payment') settleOrder(token, state === 'cancelled' ? 'given up' : 'paid');
  }, [state, token]);
  // Without a payment page any more, the order waits for nothing and holds nothing.
  if (!order?.paymentUrl || state !== 'awaiting payment') return null;
  return <WaitingOrder order={order} isLeaving={leave.isPending} onLeave={() => leave.mutate()} />;
}
