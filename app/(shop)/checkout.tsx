import { useLoaderData, useRouter } from 'expo-router';
import type { GenerateMetadataFunction } from 'expo-server';
import { useEffect } from 'react';
import { View } from 'react-native';
import { NoDayOpen } from '#components/basket/no-day-open.tsx';
import { CheckoutForm, type CheckoutFields } from '#components/checkout/checkout-form.tsx';
import { CheckoutTerms, TermsWords } from '#components/checkout/checkout-terms.tsx';
import { ListWaiting } from '#components/shop/list-waiting.tsx';
import { ShopPage } from '#components/shop/shop-page.tsx';
import { css } from '#components/theme/css.ts';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useBasketOrder } from '#hooks/basket-lines.ts';
import { checkoutResolver, warmCheckoutRules } from '#hooks/checkout-resolver.ts';
import { loadCounter, useCounter } from '#hooks/counter.ts';
import { useMe } from '#hooks/me.ts';
import { useMyDetails } from '#hooks/my-account.ts';
import { refusalOf, usePlaceOrder } from '#hooks/orders.ts';
import { pageMetadata } from '#hooks/page-metadata.ts';
import { useCollections, type CutList } from '#hooks/shop.ts';
import { noteOrder, renewKey, useBasket, useIsBasketRead } from '#hooks/use-basket.ts';
import { usePageReturn } from '#hooks/use-page-return.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { ShopHome } from '#shared/contracts/shop.ts';
import { formatMoney } from '#shared/domain/words.ts';
import { AppError } from '#shared/errors.ts';

const TITLE = 'Checkout · Skelderwick Farm';

export const generateMetadata: GenerateMetadataFunction = (request) =>
  pageMetadata(request, { title: TITLE, hidden: true });

export const loader = loadCounter;

export default function CheckoutScreen() {
  const counter = useCounter(useLoaderData<typeof loader>());
  const basket = useBasket();
  const isRead = useIsBasketRead();
  useTitle(TITLE);
  const waiting = <ListWaiting title="Checkout" rows={5} />;
  return (
    <ShopPage farm={counter.farm} narrow>
      {!isRead ? (
        waiting
      ) : basket.items.length === 0 ? (
        <EmptyState level={1} title="There is nothing to pay" words="Your basket is empty.">
          <ButtonLink href="/" label="See the boxes" />
        </EmptyState>
      ) : (
        <StateView query={counter} what="what is on the counter" waiting={waiting}>
          {(data) => <Checkout {...data} />}
        </StateView>
      )}
    </ShopPage>
  );
}

function Checkout({ home, cuts }: { home: ShopHome; cuts: CutList }) {
  const basket = useBasket();
  const router = useRouter();
  const { day, items, lines, totalPence, isRight } = useBasketOrder(basket, { home, cuts });
  const collections = useCollections(day?.id);
  const { data: me } = useMe();
  const { data: mine } = useMyDetails(Boolean(me?.user));
  const place = usePlaceOrder();
  usePageReturn(place.reset);
  useEffect(warmCheckoutRules, []);
  if (!day) return <NoDayOpen />;

  const send = (fields: CheckoutFields, basketKey = basket.key) => {
    if (place.isPending || place.isSuccess) return;
    place.mutate(
      { ...fields, basketKey, dayId: day.id, lines },
      {
        // The order that this basket once became is over (cancelled elsewhere): the same things under a new key.
        onError: (error) => {
          if (error instanceof AppError && error.code === 'BASKET_EXPIRED' && basketKey === basket.key) {
            send(fields, renewKey());
          }
        },
        onSuccess: ({ token, paymentUrl }) => {
          noteOrder(token);
          if (paymentUrl) window.location.assign(paymentUrl);
          else router.replace(`/orders/${token}`);
        },
      },
    );
  };
  return (
    <View style={css('w-stack-l')}>
      <View style={css('w-section')}>
        <TextLink href="/basket" place="alone" tone="ink" icon="back">
          Basket
        </TextLink>
        <TitleBar title="Checkout" />
        {isRight ? null : <NotRight />}
        {day ? (
          <CheckoutTerms day={day} lines={items.flatMap(({ line }) => (line ? [line] : []))} totalPence={totalPence} />
        ) : null}
      </View>
      <StateView query={collections} what="the places and times" waiting={<Skeleton shape="rows" count={4} />}>
        {({ points }) => (
          <CheckoutForm
            points={points}
            resolver={checkoutResolver}
            known={mine ? { name: mine.name, email: mine.email, phone: mine.phone } : {}}
            asksNews={!mine?.news.isGiven}
            terms={<TermsWords day={day} />}
            buttonLabel={`Go to payment · ${formatMoney(totalPence)}`}
            isSending={place.isPending || place.isSuccess}
            refusal={refusalOf(place.error)}
            onSubmit={(fields) => send(fields)}
          />
        )}
      </StateView>
    </View>
  );
}

function NotRight() {
  return (
    <Notice
      kind="held"
      title="Something in your basket is no longer there as you chose it."
      kept="Nothing was ordered; the basket is as you left it."
    >
      <ButtonLink kind="quiet" small href="/basket" label="Back to the basket" />
    </Notice>
  );
}
