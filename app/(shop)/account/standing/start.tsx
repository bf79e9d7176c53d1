import { Redirect, useLoaderData } from 'expo-router';
import type { GenerateMetadataFunction } from 'expo-server';
import { useState } from 'react';
import { View } from 'react-native';
import { NoDayOpen } from '#components/basket/no-day-open.tsx';
import { SlotPicker } from '#components/checkout/slot-picker.tsx';
import { ListWaiting } from '#components/shop/list-waiting.tsx';
import { ShopPage } from '#components/shop/shop-page.tsx';
import { StandingFields, type StandingValues } from '#components/standing/standing-fields.tsx';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { loadCounter, useCounter } from '#hooks/counter.ts';
import { useMe } from '#hooks/me.ts';
import { useMyDetails } from '#hooks/my-account.ts';
import { refusalOf } from '#hooks/orders.ts';
import { pageMetadata } from '#hooks/page-metadata.ts';
import { useCollections } from '#hooks/shop.ts';
import { useMyStanding, useStartStanding } from '#hooks/standing.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { MyDetails } from '#shared/contracts/account.ts';
import type { ShopHome } from '#shared/contracts/shop.ts';
import type { MyStanding } from '#shared/contracts/standing-orders.ts';
import { STANDING_WEEKS } from '#shared/domain/standing-order.ts';
import { formatMoney } from '#shared/domain/words.ts';

const TITLE = 'Start a standing order · Skelderwick Farm';

export const generateMetadata: GenerateMetadataFunction = (request) =>
  pageMetadata(request, { title: TITLE, hidden: true });

export const loader = loadCounter;

export default function StartStandingScreen() {
  const counter = useCounter(useLoaderData<typeof loader>());
  const me = useMe();
  const isSignedIn = Boolean(me.data?.user);
  const details = useMyDetails(isSignedIn);
  const mine = useMyStanding(isSignedIn);
  useTitle(TITLE);
  if (me.data?.user === null) return <Redirect href="/account/sign-in?next=/account/standing/start" />;
  const query = {
    data:
      counter.data && details.data && mine.data
        ? { home: counter.data.home, details: details.data, mine: mine.data }
        : undefined,
    error: counter.error ?? details.error ?? mine.error,
    refetch: () => Promise.all([counter.refetch(), details.refetch(), mine.refetch()]),
  };
  return (
    <ShopPage farm={counter.farm} narrow>
      <StateView query={query} what="the boxes" waiting={<ListWaiting title="Start a standing order" />}>
        {(data) => <Start {...data} />}
      </StateView>
    </ShopPage>
  );
}

type StartProps = { home: ShopHome; details: MyDetails; mine: MyStanding };

function Start({ home, details, mine }: StartProps) {
  const days = home.days.filter((day) => day.isInTime);
  const [values, setValues] = useState<StandingValues>({
    ...{ slug: '', slotId: '', isAgreed: false, phone: details.phone, everyWeeks: '4' },
    dayId: days[0]?.id ?? '',
  });
  const [key, setKey] = useState(() => crypto.randomUUID());
  const [missing, setMissing] = useState<Record<string, string>>({});
  const start = useStartStanding();
  const change = (change: Partial<StandingValues>) => setValues({ ...values, ...change });
  if (days.length === 0) return <NoDayOpen />;

  const boxes = home.boxes.map(({ slug, name, pricePence, offers }) => ({
    ...{ slug, name, pricePence },
    isFree: offers.some((offer) => offer.dayId === values.dayId && offer.free > 0),
  }));
  const box = boxes.find((one) => one.slug === values.slug && one.isFree);
  const everyWeeks = STANDING_WEEKS.find((weeks) => String(weeks) === values.everyWeeks);
  const errors = { ...refusalOf(start.error)?.fields, ...missing };
  const send = () => {
    const { slotId, dayId, phone, isAgreed } = values;
    const gaps = missingOf({ ...values, slug: box?.slug ?? '' });
    setMissing(gaps);
    if (!box || !everyWeeks || !isAgreed || Object.keys(gaps).length > 0) return;
    start.mutate(
      { basketKey: key, slug: box.slug, quantity: 1, everyWeeks, dayId, slotId, name: details.name, phone, isAgreed },
      {
        onError: () => setKey(crypto.randomUUID()),
        onSuccess: ({ paymentUrl, token }) => window.location.assign(paymentUrl ?? `/orders/${token}`),
      },
    );
  };
  return (
    <View style={css('w-form')}>
      <TitleBar
        back={{ href: '/account/standing', label: 'Standing orders' }}
        title="Start a standing order"
        lead="The same box again every few weeks, until you say otherwise."
      />
      <StandingFields
        values={values}
        onChange={change}
        boxes={boxes}
        days={days}
        terms={mine.terms}
        reminderDays={mine.reminderDays}
        errors={errors}
        slots={
          <Slots
            dayId={values.dayId}
            slotId={values.slotId}
            onSlot={(slotId) => change({ slotId })}
            error={errors.slotId}
          />
        }
      />
      <ProblemNotice error={start.error} title="The standing order was not started." />
      <Button
        wide
        label={box ? `Go to payment · ${formatMoney(box.pricePence)}` : 'Go to payment'}
        busy={start.isPending || start.isSuccess}
        busyLabel="Keeping it for you …"
        onPress={send}
      />
    </View>
  );
}

function missingOf({ slug, slotId, phone, isAgreed }: StandingValues): Record<string, string> {
  return {
    ...(slug ? {} : { slug: 'Choose a box that is free on this day.' }),
    ...(slotId ? {} : { slotId: 'Choose a place and a time.' }),
    ...(phone.trim() ? {} : { phone: 'Give a telephone number.' }),
    ...(isAgreed ? {} : { isAgreed: 'Agree to the terms, or order without a standing order.' }),
  };
}

type SlotsProps = { dayId: string; slotId: string; onSlot: (slotId: string) => void; error: string | undefined };

function Slots({ dayId, slotId, onSlot, error }: SlotsProps) {
  const collections = useCollections(dayId);
  const [pointId, setPointId] = useState<string>();
  return (
    <StateView query={collections} what="the places and times" waiting={<Skeleton shape="rows" count={3} />}>
      {({ points }) => (
        <SlotPicker
          points={points}
          pointId={points.length === 1 ? points[0]?.id : pointId}
          onPoint={(id) => {
            setPointId(id);
            onSlot('');
          }}
          slotId={slotId}
          onSlot={onSlot}
          error={error}
        />
      )}
    </StateView>
  );
}
