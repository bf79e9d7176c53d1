import { useLocalSearchParams, useRouter } from 'expo-router';
import type { GenerateMetadataFunction } from 'expo-server';
import { useState } from 'react';
import { View } from 'react-native';
import { SlotPicker } from '#components/checkout/slot-picker.tsx';
import { whenWords } from '#components/orders/order-words.ts';
import { ListWaiting } from '#components/shop/list-waiting.tsx';
import { ShopPage } from '#components/shop/shop-page.tsx';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useChangeSlot } from '#hooks/order-changes.ts';
import { refusalOf, useOpenOrder } from '#hooks/orders.ts';
import { pageMetadata } from '#hooks/page-metadata.ts';
import { useCollections } from '#hooks/shop.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { Order } from '#shared/contracts/orders.ts';
import type { CollectionPoint } from '#shared/contracts/shop.ts';

const TITLE = 'Another place or time · Skelderwick Farm';

export const generateMetadata: GenerateMetadataFunction = (request) =>
  pageMetadata(request, { title: TITLE, hidden: true });

export default function TimeScreen() {
  const { token } = useLocalSearchParams<{ token: string }>();
  const order = useOpenOrder(token);
  const collections = useCollections(order.data?.dayId);
  useTitle(TITLE);
  const data = order.data && collections.data ? { order: order.data, points: collections.data.points } : undefined;
  const error = order.error ?? collections.error;
  const refetch = () => Promise.all([order.refetch(), collections.refetch()]);
  return (
    <ShopPage farm={null} narrow>
      <StateView
        query={{ data, error, refetch }}
        what="the places and times"
        waiting={<ListWaiting title="Another place or time" rows={4} />}
      >
        {(ready) => (ready.order.canChange ? <Choose {...ready} /> : <TooLate token={token} />)}
      </StateView>
    </ShopPage>
  );
}

function Choose({ order, points }: { order: Order; points: CollectionPoint[] }) {
  const router = useRouter();
  const change = useChangeSlot(order.token);
  const [slotId, setSlotId] = useState(order.slotId);
  const present = points.find((point) => point.slots.some((slot) => slot.id === order.slotId));
  const [pointId, setPointId] = useState(present?.id);
  const refusal = refusalOf(change.error);
  const back = `/orders/${order.token}` as const;
  return (
    <View style={css('w-stack-l')}>
      <View style={css('w-section')}>
        <TextLink href={back} place="alone" tone="ink" icon="back">
          {`Order ${order.orderNo}`}
        </TextLink>
        <TitleBar
          title="Another place or time"
          lead={`Now it is ${whenWords(order.collection)}, ${order.collection.name}.`}
        />
      </View>
      <SlotPicker
        points={points}
        pointId={pointId}
        onPoint={(id) => {
          setPointId(id);
          setSlotId('');
        }}
        slotId={slotId}
        onSlot={setSlotId}
        error={refusal?.fields.slotId}
      />
      {refusal && !refusal.fields.slotId ? <Notice kind="error" title={refusal.message} /> : null}
      <Button
        wide
        label="Move it there"
        busy={change.isPending}
        busyLabel="Moving it …"
        disabled={slotId === '' || slotId === order.slotId}
        onPress={() => change.mutate(slotId, { onSuccess: () => router.replace(back) })}
      />
    </View>
  );
}

function TooLate({ token }: { token: string }) {
  return (
    <EmptyState
      level={1}
      title="The time cannot be changed any more"
      words="Either its cut-off has passed or it is not paid. Ring the farm if you cannot come."
    >
      <ButtonLink href={`/orders/${token}`} label="Back to the order" />
    </EmptyState>
  );
}
