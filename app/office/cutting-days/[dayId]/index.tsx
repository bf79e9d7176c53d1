import { useLocalSearchParams } from 'expo-router';
import { useState } from 'react';
import { View } from 'react-native';
import { BookingForm, type Booking } from '#components/carcases/booking-form.tsx';
import { CarcaseTable } from '#components/carcases/carcase-table.tsx';
import { CloseDay } from '#components/carcases/close-day.tsx';
import { SpecificationChoice } from '#components/carcases/specification-choice.tsx';
import { runningWithdrawal } from '#components/herd/animal-state.ts';
import { DayPlaces } from '#components/office/day-places.tsx';
import { css } from '#components/theme/css.ts';
import { Heading } from '#components/ui/heading.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { Text } from '#components/ui/text.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useBookCarcases, useChooseSpecification, useCloseCuttingDay, useCuttingDay } from '#hooks/carcases.ts';
import { useAnimals } from '#hooks/herd.ts';
import { useToday } from '#hooks/office.ts';
import { useSpecifications } from '#hooks/specifications.ts';
import { sendForm, useContractForm } from '#hooks/use-contract-form.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { CuttingDay } from '#shared/contracts/carcases.ts';
import type { Animal } from '#shared/contracts/herd.ts';
import { formatEarTag } from '#shared/domain/ear-tag.ts';
import { editionsOnOffer } from '#shared/domain/specification-editions.ts';
import { formatCount, formatDay, formatDayTime, formatKilograms } from '#shared/domain/words.ts';

const loadSchema = async () => (await import('#hooks/form-schemas.ts')).carcases.bookCarcasesSchema.body;

export default function CuttingDayScreen() {
  const { dayId } = useLocalSearchParams<{ dayId: string }>();
  const day = useCuttingDay(dayId);
  return (
    <StateView
      query={day}
      what="this cutting day"
      waiting={<Skeleton shape="rows" count={4} />}
      missing={{ title: 'No such cutting day', words: 'Look for it in the list of cutting days.' }}
    >
      {(data) => <Ready day={data} />}
    </StateView>
  );
}

function Ready({ day }: { day: CuttingDay }) {
  const close = useCloseCuttingDay();
  // Counts up so that the booking form starts afresh after a booking.
  const [booked, setBooked] = useState(0);
  const isClosed = day.state === 'closed';
  useTitle(`Cutting day ${formatDay(day.day)}`);
  const closeDay = () => close.mutateAsync({ params: { dayId: day.id }, body: { version: day.version } });
  return (
    <View style={css('w-stack-l')}>
      <TitleBar
        title={formatDay(day.day)}
        above={`Cutting day · ${day.state} · ${formatCount(day.carcases.length, 'carcase')} · ${formatKilograms(day.coldGrams)} cold · ${formatCount(day.orders, 'order')}`}
      />
      <DayPlaces dayId={day.id} role="owner" path={`/office/cutting-days/${day.id}`} />
      <Text tone="quiet">{`Orders until ${formatDayTime(day.cutOffAt)}. Cut by “${day.specificationName}”.`}</Text>
      {day.state === 'planned' ? <ChooseSpecification key={day.specificationId} day={day} /> : null}
      <CarcaseTable carcases={day.carcases} />
      {isClosed ? (
        <Notice kind="info" title="This day is closed." kept="Its weights, orders and plan stay as they are." />
      ) : (
        <>
          <View style={css('w-stack')}>
            <Heading level={2}>Book animals</Heading>
            <Book key={booked} day={day} onBooked={() => setBooked(booked + 1)} />
          </View>
          <CloseDay busy={close.isPending} onClose={closeDay} error={close.error} />
        </>
      )}
    </View>
  );
}

/** Until the day is put on sale it may be cut otherwise; what was planned is then out of date. */
function ChooseSpecification({ day }: { day: CuttingDay }) {
  const specifications = useSpecifications();
  const choose = useChooseSpecification();
  const [chosenId, setChosenId] = useState(day.specificationId);
  const send = () =>
    choose.mutate({ params: { dayId: day.id }, body: { version: day.version, specificationId: chosenId } });
  return (
    <StateView query={specifications} what="the cutting specifications">
      {(data) => (
        <View style={css('w-stack')}>
          <SpecificationChoice
            specifications={editionsOnOffer(data.specifications)}
            present={{ id: day.specificationId, label: day.specificationName }}
            chosenId={chosenId}
            onChoose={setChosenId}
            onSend={send}
            busy={choose.isPending}
          />
          <ProblemNotice error={choose.error} title="The day keeps its specification." />
        </View>
      )}
    </StateView>
  );
}

function Book({ day, onBooked }: { day: CuttingDay; onBooked: () => void }) {
  const animals = useAnimals();
  const today = useToday();
  const book = useBookCarcases();
  const form = useContractForm<Booking>(loadSchema, { animalIds: [], killDay: '', cuttingDayId: day.id });
  const submit = sendForm(form, async (body) => {
    await book.mutateAsync({ body });
    onBooked();
  });
  return (
    <StateView query={animals} what="the herd">
      {(data) => (
        <View style={css('w-stack')}>
          <BookingForm
            control={form.control}
            animals={choicesOf(data.animals, today.data?.today)}
            latestKillDay={day.day}
            onSubmit={submit}
            busy={book.isPending}
          />
          <ProblemNotice error={book.error} title="Nothing was booked." />
        </View>
      )}
    </StateView>
  );
}

/** Animals in the field that could be ready: prime cattle before cows, the oldest first. */
function choicesOf(animals: readonly Animal[], today: string | undefined) {
  return animals
    .filter((animal) => !animal.carcase)
    .toSorted((a, b) => Number(a.sex === 'cow') - Number(b.sex === 'cow') || a.born.localeCompare(b.born))
    .map((animal) => {
      const clearDay = runningWithdrawal(animal, today);
      return {
        id: animal.id,
        label: formatEarTag(animal.earTag),
        note: [
          `${animal.breed} ${animal.sex}`,
          formatCount(animal.ageMonths, 'month'),
          animal.liveGrams === null ? 'not weighed' : `${formatKilograms(animal.liveGrams)} live`,
          ...(clearDay ? [`withdrawal to ${formatDay(clearDay)}`] : []),
        ].join(', '),
      };
    });
}
