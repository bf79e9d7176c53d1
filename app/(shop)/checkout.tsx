import { useLoaderData, useRouter } from 'expo-router';
import type { GenerateMetadataFunction } from 'expo-server';
import { useEffect } from 'react';
import { View } from 'react-native';
import { NoDayOpen } from '#components/basket/no-day-open.tsx';
import { CheckoutForm as FilledIn } from '#components/checkout/checkout-form.tsx';
import { CheckoutTerms, TermsWords } from '#components/checkout/checkout-terms.tsx';
import { PromoField } from '#components/checkout/promo-field.tsx';
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
import { bodyOf, useCheckout } from '#hooks/checkout.ts';
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
import type { CheckoutForm } from '#shared/contracts/checkout-form-schema.ts';
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
  const { day, items, lines, totalPence: goodsPence, isRight } = useBasketOrder(basket, { home, cuts });
  const sum = useCheckout({ dayId: day?.id, lines, goodsPence });
  const collections = useCollections(day?.id);
  const { data: me } = useMe();
  const { data: mine } = useMyDetails(Boolean(me?.user));
  const place = usePlaceOrder();
  usePageReturn(place.reset);
  useEffect(warmCheckoutRules, []);
  if (!day) return <NoDayOpen />;
  const refusal = refusalOf(place.error);

  const send = (form: CheckoutForm, basketKey = basket.key) => {
    if (place.isPending || place.isSuccess) return;
    place.mutate(bodyOf(form, { basketKey, dayId: day.id, lines, promoCode: sum.promo.taken?.code }), {
      // The order that this basket once became is over (cancelled elsewhere): the same things under a new key.
      onError: (error) => {
        if (error instanceof AppError && error.code === 'BASKET_EXPIRED' && basketKey === basket.key) {
          send(form, renewKey());
        }
      },
      onSuccess: ({ token, paymentUrl }) => {
        noteOrder(token);
        if (paymentUrl) window.location.assign(paymentUrl);
        else router.replace(`/orders/${token}`);
      },
    });
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
          <CheckoutTerms
            day={day}
            lines={items.flatMap(({ line }) => (line ? [line] : []))}
            discountPence={sum.discountPence}
            deliveryPence={sum.deliveryPence}
            totalPence={sum.totalPence}
          />
        ) : null}
        <PromoField {...sum.promo} error={sum.promo.error ?? refusal?.fields.promoCode} />
      </View>
      <StateView query={collections} what="the places and times" waiting={<Skeleton shape="rows" count={4} />}>
        {({ points, hasVan }) => (
          <FilledIn
            points={points}
            resolver={checkoutResolver}
            known={mine ? { name: mine.name, email: mine.email, phone: mine.phone } : {}}
            asksNews={!mine?.news.isGiven}
            van={hasVan ? { answer: sum.vanAnswer, onPostcode: sum.setPostcode } : undefined}
            onChoice={sum.setChoice}
            depositWords={sum.depositPence === null ? undefined : depositWords(sum.depositPence)}
            terms={<TermsWords day={day} restPence={sum.totalPence - sum.duePence} />}
            buttonLabel={`Go to payment · ${formatMoney(sum.duePence)}`}
            isSending={place.isPending || place.isSuccess}
            refusal={refusal}
            onSubmit={(form) => send(form)}
          />
        )}
      </StateView>
    </View>
  );
}

function depositWords(pence: number): string {
  return `${formatMoney(pence)} now, the rest once it is packed and weighed.`;
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
