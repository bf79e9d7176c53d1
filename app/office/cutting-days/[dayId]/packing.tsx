import { useLocalSearchParams } from 'expo-router';
import { useState } from 'react';
import { View } from 'react-native';
import { DayPlaces } from '#components/office/day-places.tsx';
import { CuttingList } from '#components/packs/cutting-list.tsx';
import { DarkRoom } from '#components/packs/dark-room.tsx';
import { FillList } from '#components/packs/fill-list.tsx';
import { nameCarcase } from '#components/packs/fill-words.ts';
import { PackChange } from '#components/packs/pack-change.tsx';
import { PackList } from '#components/packs/pack-list.tsx';
import { WeighForm, type NewPacks } from '#components/packs/weigh-form.tsx';
import { css } from '#components/theme/css.ts';
import { useBreakpoint } from '#components/theme/use-breakpoint.ts';
import { Button } from '#components/ui/button.tsx';
import { Disclosure } from '#components/ui/disclosure.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { Sheet } from '#components/ui/sheet.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { Text } from '#components/ui/text.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useMe } from '#hooks/me.ts';
import { useAddPacks, useFillOrders, useLosePack, usePackingDay, usePackShort, useReweighPack } from '#hooks/packs.ts';
import { sendForm, useContractForm } from '#hooks/use-contract-form.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { Fill, Pack, PackingDay } from '#shared/contracts/packs.ts';
import { formatCount, formatDay, formatGrams, formatKilograms } from '#shared/domain/words.ts';

const loadPacks = async () => (await import('#hooks/form-schemas.ts')).packs.addPacksSchema.body;
const loadWeight = async () => (await import('#hooks/form-schemas.ts')).packs.reweighPackSchema.body;

export default function PackingScreen() {
  const { dayId } = useLocalSearchParams<{ dayId: string }>();
  const day = usePackingDay(dayId);
  return (
    <StateView
      query={day}
      what="the packing of this day"
      waiting={<Skeleton shape="rows" count={5} />}
      missing={{ title: 'No such cutting day', words: 'Look for it in the list of cutting days.' }}
    >
      {(data) => <Packing day={data} />}
    </StateView>
  );
}

function Packing({ day }: { day: PackingDay }) {
  const me = useMe();
  const [open, setOpen] = useState<Pack>();
  const role = me.data?.user?.role ?? 'packer';
  const packedGrams = day.packs.reduce((sum, pack) => sum + pack.grams, 0);
  useTitle(`Packing ${formatDay(day.day)}`);
  return (
    <View style={css('w-stack-l')}>
      <TitleBar
        title="Packing"
        above={`${formatDay(day.day)} · ${formatCount(day.packs.length, 'pack')} · ${formatKilograms(packedGrams)}`}
        actions={<DarkRoom />}
      />
      <DayPlaces dayId={day.dayId} role={role} path={`/office/cutting-days/${day.dayId}/packing`} />
      <Weighing day={day} />
      <Heading level={2}>Packs</Heading>
      <PackList packs={day.packs} onOpen={setOpen} />
      <Orders day={day} isOwner={role === 'owner'} />
      <Sheet open={open !== undefined} onClose={() => setOpen(undefined)} title={`Pack ${open?.code ?? ''}`}>
        {open ? <Change key={open.id} pack={open} onDone={() => setOpen(undefined)} /> : null}
      </Sheet>
    </View>
  );
}

function Orders({ day, isOwner }: { day: PackingDay; isOwner: boolean }) {
  const fill = useFillOrders();
  const [short, setShort] = useState<Fill>();
  const unfilled = day.fills.filter((one) => !one.isFilled).length;
  const actionsOf = (one: Fill) =>
    isOwner && one.kind === 'order' ? (
      <View style={css('w-buttons')}>
        <Button
          kind="quiet"
          small
          label="Pack it short"
          name={`Pack order ${one.orderNo} short`}
          onPress={() => setShort(one)}
        />
      </View>
    ) : null;
  return (
    <>
      <Heading level={2}>Orders</Heading>
      {fill.isSuccess ? (
        <Notice
          kind={unfilled > 0 ? 'held' : 'good'}
          spoken
          title={
            unfilled > 0 ? `${formatCount(unfilled, 'place')} could not be filled.` : 'Everything ordered is filled.'
          }
          next={unfilled > 0 ? 'What is missing stands below. Weigh more packs and fill again.' : undefined}
        />
      ) : null}
      <View style={css('w-buttons')}>
        <Button
          kind="quiet"
          label="Fill the orders"
          busy={fill.isPending}
          busyLabel="Filling …"
          onPress={() => fill.mutate(day.dayId)}
        />
      </View>
      <ProblemNotice error={fill.error} title="The orders were not filled." />
      <FillList fills={day.fills} actionsOf={actionsOf} />
      <Sheet
        open={short !== undefined}
        onClose={() => setShort(undefined)}
        title={`Pack order ${short?.orderNo ?? ''} short?`}
      >
        {short ? <PackShort dayId={day.dayId} fill={short} onDone={() => setShort(undefined)} /> : null}
      </Sheet>
    </>
  );
}

function PackShort({ dayId, fill, onDone }: { dayId: string; fill: Fill; onDone: () => void }) {
  const packShort = usePackShort();
  const send = () => packShort.mutate({ params: { dayId, orderNo: String(fill.orderNo) } }, { onSuccess: onDone });
  return (
    <View style={css('w-stack')}>
      <Text>
        {`${fill.orderName} gets what is there. What is missing is paid back at once and told by e-mail; nothing can be added afterwards.`}
      </Text>
      <ProblemNotice error={packShort.error} title="The order was not packed short." />
      <Button kind="danger" wide label="Pack it short and refund" busy={packShort.isPending} onPress={send} />
    </View>
  );
}

function Weighing({ day }: { day: PackingDay }) {
  const add = useAddPacks();
  const [saved, setSaved] = useState({ count: 0, words: '' });
  const isWide = useBreakpoint() !== 'narrow';
  const only = day.carcases.length === 1 ? day.carcases[0]?.id : undefined;
  const form = useContractForm<NewPacks>(loadPacks, { carcaseId: only ?? '', cutId: '', grams: [undefined] });
  const submit = sendForm(form, async (body) => {
    const known = new Set(day.packs.map((pack) => pack.id));
    const after = await add.mutateAsync({ params: { dayId: day.dayId }, body });
    const pack = after.packs.find((one) => !known.has(one.id));
    setSaved({ count: saved.count + 1, words: pack ? `${pack.code}: ${pack.cut}, ${formatGrams(pack.grams)}` : '' });
    form.reset({ carcaseId: body.carcaseId, cutId: body.cutId, grams: [undefined] });
  });
  const weigh = ({ carcaseId, cutId }: { carcaseId: string; cutId: string }) => {
    form.reset({ carcaseId, cutId, grams: [undefined] });
    setSaved({ count: saved.count + 1, words: '' });
  };
  return (
    <View style={css('w-columns')}>
      <View style={css('w-stack')}>
        <Heading level={2}>Weigh</Heading>
        <WeighForm control={form.control} day={day} onSubmit={submit} busy={add.isPending} saved={saved.count} />
        {saved.words ? <Notice kind="good" spoken title={`Saved as pack ${saved.words}`} /> : null}
        <ProblemNotice error={add.error} title="The pack was not saved." />
      </View>
      <View style={css('w-stack')}>
        <Heading level={2}>Cutting list</Heading>
        {day.carcases.map((carcase) => (
          <Disclosure key={carcase.id} words={nameCarcase(carcase)} open={isWide}>
            <CuttingList
              title={nameCarcase(carcase)}
              lines={day.cuttingList.filter((line) => line.carcaseId === carcase.id)}
              onWeigh={weigh}
            />
          </Disclosure>
        ))}
      </View>
    </View>
  );
}

function Change({ pack, onDone }: { pack: Pack; onDone: () => void }) {
  const reweigh = useReweighPack();
  const lose = useLosePack();
  const form = useContractForm<{ grams: number }>(loadWeight, { grams: pack.grams });
  const submit = sendForm(form, async (body) => {
    await reweigh.mutateAsync({ params: { packId: pack.id }, body });
    onDone();
  });
  return (
    <View style={css('w-stack')}>
      <PackChange
        pack={pack}
        control={form.control}
        busy={reweigh.isPending || lose.isPending}
        onReweigh={submit}
        onLose={(reason) => lose.mutate({ params: { packId: pack.id }, body: { reason } }, { onSuccess: onDone })}
      />
      <ProblemNotice error={reweigh.error ?? lose.error} title="The pack was not changed." />
    </View>
  );
}
