import { useLocalSearchParams } from 'expo-router';
import { useState } from 'react';
import { View } from 'react-native';
import { BalanceList } from '#components/carcases/balance-list.tsx';
import { CarcaseNotes } from '#components/carcases/carcase-notes.tsx';
import { CarcaseRails } from '#components/carcases/carcase-rails.tsx';
import { describeCarcase, nameCarcase } from '#components/carcases/carcase-words.ts';
import { CutoutTable } from '#components/carcases/cutout-table.tsx';
import { KillSheetForm } from '#components/carcases/kill-sheet-form.tsx';
import { LiveWeightForm } from '#components/carcases/live-weight-form.tsx';
import { WeighingChoice } from '#components/carcases/weighing-choice.tsx';
import { WeightsForm, type WeighingDepth, type Weights } from '#components/carcases/weights-form.tsx';
import { changedWeights, weighableOf } from '#components/carcases/weight-difference.ts';
import { css } from '#components/theme/css.ts';
import { Heading } from '#components/ui/heading.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useCarcase, useEnterKillSheet, useEnterWeights } from '#hooks/carcases.ts';
import { sendForm, useContractForm } from '#hooks/use-contract-form.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { Carcase, KillSheet } from '#shared/contracts/carcases.ts';
import { formatDay } from '#shared/domain/words.ts';
import { CONFORMATIONS, FAT_CLASSES } from '#shared/engine/figures/class-scale.ts';

const loadKillSheet = async () => (await import('#hooks/form-schemas.ts')).carcases.KillSheet;
const loadWeights = async () => (await import('#hooks/form-schemas.ts')).carcases.enterWeightsSchema.body;

export default function CarcaseScreen() {
  const { carcaseId } = useLocalSearchParams<{ carcaseId: string }>();
  const carcase = useCarcase(carcaseId);
  // Counts up to draw the forms afresh, with the record as it is now.
  const [round, setRound] = useState(0);
  return (
    <StateView
      query={carcase}
      what="this carcase"
      waiting={<Skeleton shape="rail" />}
      missing={{ title: 'No such carcase', words: 'Look for it on its cutting day.' }}
    >
      {(data) => <Ready carcase={data} round={round} afresh={() => setRound(round + 1)} />}
    </StateView>
  );
}

type ReadyProps = { carcase: Carcase; round: number; afresh: () => void };

function Ready({ carcase, round, afresh }: ReadyProps) {
  const [side, setSide] = useState<'left' | 'right'>('left');
  const [depth, setDepth] = useState<WeighingDepth>('primals');
  const isKilled = carcase.state !== 'booked';
  useTitle(nameCarcase(carcase));
  return (
    <View style={css('w-stack-l')}>
      <TitleBar
        back={{ href: `/office/cutting-days/${carcase.cuttingDayId}`, label: `Cutting day ${formatDay(carcase.day)}` }}
        title={nameCarcase(carcase)}
        above={`${carcase.state} · ${describeCarcase(carcase)}`}
      />
      {round > 0 ? <Notice kind="good" spoken title="This is what is recorded now." /> : null}
      <View style={css('w-columns', 'w-columns-side')}>
        <View style={css('w-stack-l')}>
          <CarcaseRails rails={carcase.rails} name={nameCarcase(carcase)} />
          <Heading level={2}>Cutout</Heading>
          <CutoutTable nodes={carcase.nodes} />
        </View>
        <View style={css('w-stack-l')}>
          <CarcaseNotes carcase={carcase} />
          <View style={css('w-stack')}>
            <Heading level={2}>Balance</Heading>
            <BalanceList nodes={carcase.nodes} />
          </View>
          <View style={css('w-stack')}>
            <Heading level={2}>Kill sheet</Heading>
            <KillSheetEntry key={`kill ${round}`} carcase={carcase} afresh={afresh} />
          </View>
        </View>
      </View>
      {isKilled ? (
        <View style={css('w-stack')}>
          <Heading level={2}>Weights</Heading>
          <WeighingChoice side={side} depth={depth} onSide={setSide} onDepth={setDepth} />
          <WeightsEntry key={`${side} ${round}`} carcase={carcase} side={side} depth={depth} afresh={afresh} />
        </View>
      ) : (
        <View style={css('w-stack')}>
          <Heading level={2}>Live weight</Heading>
          <LiveWeightEntry key={`live ${round}`} carcase={carcase} afresh={afresh} />
        </View>
      )}
    </View>
  );
}

type EntryProps = { carcase: Carcase; afresh: () => void };

function KillSheetEntry({ carcase, afresh }: EntryProps) {
  const enter = useEnterKillSheet();
  const isWeighed = carcase.coldSource === 'weighed';
  const form = useContractForm<KillSheet>(loadKillSheet, {
    version: carcase.version,
    killDay: carcase.killDay,
    weighedAs: carcase.hotGrams === null && isWeighed ? 'cold' : 'hot',
    ...(isWeighed ? { grams: carcase.hotGrams ?? carcase.coldGrams } : {}),
    leftGrams: carcase.leftGrams,
    rightGrams: carcase.rightGrams,
    conformation: carcase.conformation as KillSheet['conformation'],
    fatClass: carcase.fatClass as KillSheet['fatClass'],
    dressingSpec: carcase.dressingSpec,
  });
  const submit = sendForm(form, async (body) => {
    await enter.mutateAsync({ params: { carcaseId: carcase.id }, body });
    afresh();
  });
  return (
    <View style={css('w-stack')}>
      <KillSheetForm
        control={form.control}
        conformations={CONFORMATIONS}
        fatClasses={FAT_CLASSES}
        onSubmit={submit}
        busy={enter.isPending}
      />
      <ProblemNotice error={enter.error} title="The kill sheet was not saved." onShowNewest={afresh} />
    </View>
  );
}

function LiveWeightEntry({ carcase, afresh }: EntryProps) {
  const enter = useEnterWeights();
  const form = useContractForm<Weights>(loadWeights, {
    version: carcase.version,
    weights: [{ path: 'live', grams: carcase.liveGrams }],
  });
  const submit = sendForm(form, async (body) => {
    await enter.mutateAsync({ params: { carcaseId: carcase.id }, body });
    afresh();
  });
  return (
    <View style={css('w-stack')}>
      <LiveWeightForm control={form.control} onSubmit={submit} busy={enter.isPending} />
      <ProblemNotice error={enter.error} title="The live weight was not saved." onShowNewest={afresh} />
    </View>
  );
}

type WeightsEntryProps = EntryProps & { side: 'left' | 'right'; depth: WeighingDepth };

function WeightsEntry({ carcase, side, depth, afresh }: WeightsEntryProps) {
  const enter = useEnterWeights();
  const [nodes] = useState(() => weighableOf(carcase.nodes, side));
  const before = nodes.map(({ path, grams, source }) => ({ path, grams: source === 'weighed' ? grams : null }));
  const form = useContractForm<Weights>(loadWeights, { version: carcase.version, weights: before });
  const submit = sendForm(form, async ({ version, weights }) => {
    const changed = changedWeights(before, weights);
    if (changed.length === 0) return;
    await enter.mutateAsync({ params: { carcaseId: carcase.id }, body: { version, weights: changed } });
    afresh();
  });
  return (
    <View style={css('w-stack')}>
      <WeightsForm control={form.control} nodes={nodes} depth={depth} onSubmit={submit} busy={enter.isPending} />
      <ProblemNotice error={enter.error} title="The weights were not saved." onShowNewest={afresh} />
    </View>
  );
}
