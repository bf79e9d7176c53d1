import { useLoaderData, useLocalSearchParams, useRouter } from 'expo-router';
import type { GenerateMetadataFunction, LoaderFunction } from 'expo-server';
import { useEffect, useState } from 'react';
import { View } from 'react-native';
import { CancelOrder } from '#components/orders/cancel-order.tsx';
import { DepositStanding } from '#components/orders/deposit-standing.tsx';
import { MoreForOrder } from '#components/orders/more-for-order.tsx';
import { OrderAfter } from '#components/orders-after/order-after.tsx';
import { OrderCollection } from '#components/orders/order-collection.tsx';
import { OrderLines } from '#components/orders/order-lines.tsx';
import { OrderPacks } from '#components/orders/order-packs.tsx';
import { OrderWay } from '#components/orders/order-way.tsx';
import { SwapSheet } from '#components/orders/swap-sheet.tsx';
import { standingOf } from '#components/orders/order-words.ts';
import { ListWaiting } from '#components/shop/list-waiting.tsx';
import { LoadedView } from '#components/shop/loaded-view.tsx';
import { ShopPage } from '#components/shop/shop-page.tsx';
import { css } from '#components/theme/css.ts';
import { Badge } from '#components/ui/badge.tsx';
import { Button } from '#components/ui/button.tsx';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { Text } from '#components/ui/text.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { pathOf } from '#hooks/api.ts';
import { loadFarm, type Farm } from '#hooks/farm.ts';
import { load, type Loaded } from '#hooks/loaded.ts';
import { useCancelOrder, useLeaveAddition, useLeavePayment, useSwapBox } from '#hooks/order-changes.ts';
import { useFeedback, useOrderAgain } from '#hooks/order-after.ts';
import { refusalOf, useOrder } from '#hooks/orders.ts';
import { pageMetadata } from '#hooks/page-metadata.ts';
import { settleOrder } from '#hooks/use-basket.ts';
import { useTitle } from '#hooks/use-title.ts';
import { getOrderCalendar, getReceipt } from '#shared/contracts/downloads.ts';
import { getOrder, type Order } from '#shared/contracts/orders.ts';

type Page = { farm: Farm | null; order: Loaded<Order> };

export const generateMetadata: GenerateMetadataFunction = (request) =>
  pageMetadata(request, { title: 'Your order · Skelderwick Farm', hidden: true });

export const loader: LoaderFunction<Page> = async (_request, params) => {
  const [farm, order] = await Promise.all([loadFarm(), load(getOrder, { params: { token: String(params.token) } })]);
  return { farm, order };
};

export default function OrderScreen() {
  const { token, from } = useLocalSearchParams<{ token: string; from?: string }>();
  const page = useLoaderData<typeof loader>();
  const query = useOrder(token, page.order);
  useTitle(query.data ? `Order ${query.data.orderNo} · Skelderwick Farm` : 'Your order · Skelderwick Farm');
  return (
    <ShopPage farm={page.farm} narrow>
      <LoadedView
        loaded={page.order}
        query={query}
        what="your order"
        waiting={<ListWaiting title="Your order" />}
        missing={{
          title: 'There is no such order',
          words: 'The address is long and private: please open the link from your mail once more, all of it.',
          children: <ButtonLink href="/" kind="quiet" label="To the shop" />,
        }}
      >
        {(order) => <OrderPage order={order} hasLeft={from === 'left'} />}
      </LoadedView>
    </ShopPage>
  );
}

function OrderPage({ order, hasLeft }: { order: Order; hasLeft: boolean }) {
  const cancel = useCancelOrder(order.token);
  const [swapping, setSwapping] = useState<Order['lines'][number]>();
  const standing = standingOf(order, hasLeft);
  const { state, token } = order;
  useEffect(() => {
    if (state !== 'awaiting payment') settleOrder(token, state === 'cancelled' ? 'given up' : 'paid');
  }, [state, token]);
  const isOn = !['cancelled', 'collected', 'delivered'].includes(state) && !isDead(order);
  return (
    <View style={css('w-stack-l')}>
      <View style={css('w-section')} aria-live="polite">
        <TitleBar look="display" above={`Order ${order.orderNo}`} title={standing.title} lead={standing.lead} />
        <Badge kind={standing.kind}>{standing.badge}</Badge>
        {state === 'awaiting payment' ? <Paying order={order} /> : null}
        {state === 'awaiting payment' || state === 'cancelled' ? null : <DepositStanding order={order} />}
      </View>
      <OrderWay order={order} />
      {isOn ? (
        <OrderCollection
          order={order}
          calendarHref={pathOf(getOrderCalendar, { params: { token } })}
          change={
            order.canChange && !order.isDelivered ? (
              <TextLink href={`/orders/${token}/time`} place="alone" icon="forward">
                Change the place or time
              </TextLink>
            ) : null
          }
        />
      ) : null}
      <OrderPacks packs={order.packs} />
      <OrderLines order={order} onSwap={setSwapping} />
      {swapping ? <Swap order={order} line={swapping} onClose={() => setSwapping(undefined)} /> : null}
      {order.canChange ? <More order={order} /> : null}
      {order.canChange ? (
        <CancelOrder
          order={order}
          onCancel={() => cancel.mutate()}
          isCancelling={cancel.isPending}
          refusal={refusalOf(cancel.error)?.message}
        />
      ) : null}
      {order.paymentState === 'unpaid' ? null : <After order={order} />}
      <Text size="small" tone="quiet" measure>
        The address of this page is private: whoever has it can see this order and cancel it.
      </Text>
    </View>
  );
}

function More({ order }: { order: Order }) {
  const leave = useLeaveAddition(order.token);
  return <MoreForOrder order={order} onLeave={() => leave.mutate()} isLeaving={leave.isPending} />;
}

function Swap({ order, line, onClose }: { order: Order; line: Order['lines'][number]; onClose: () => void }) {
  const swap = useSwapBox(order.token);
  return (
    <SwapSheet
      line={line}
      onClose={onClose}
      onSwap={(chosen) => swap.mutate(chosen, { onSuccess: onClose })}
      isSwapping={swap.isPending}
      refusal={refusalOf(swap.error)?.message}
    />
  );
}

function After({ order: { token, orderNo, state } }: { order: Order }) {
  const router = useRouter();
  const again = useOrderAgain(token, () => router.push('/basket'));
  const feedback = useFeedback(token, state === 'collected' || state === 'delivered');
  const receiptHref = pathOf(getReceipt, { params: { token } });
  return <OrderAfter orderNo={orderNo} receiptHref={receiptHref} again={again} feedback={feedback} />;
}

/** Its payment page is closed and nothing is held any more. */
function isDead(order: Order): boolean {
  return order.state === 'awaiting payment' && !order.paymentUrl;
}

function Paying({ order }: { order: Order }) {
  const leave = useLeavePayment(order.token);
  const router = useRouter();
  if (!order.paymentUrl) return <ButtonLink href="/basket" label="Back to the basket" />;
  return (
    <View style={css('w-buttons')}>
      <ButtonLink outside href={order.paymentUrl} label="Go on paying" icon="forward" />
      <Button
        kind="quiet"
        label="Change the basket"
        busy={leave.isPending}
        onPress={() =>
          leave.mutate(undefined, {
            onSuccess: ({ state }) => {
              if (state === 'awaiting payment') router.push('/basket');
            },
          })
        }
      />
    </View>
  );
}
