import { useLocalSearchParams } from 'expo-router';
import { useState } from 'react';
import { View } from 'react-native';
import { JobPanel } from '#components/allocation/job-panel.tsx';
import { areSameLocks, narrowMembers, type Members } from '#components/allocation/locks.ts';
import { describeOutlets } from '#components/allocation/outlets.tsx';
import { PlanView } from '#components/allocation/plan-view.tsx';
import { boxesOnSale, describePlan } from '#components/allocation/plan-words.ts';
import { PrintedList } from '#components/allocation/printed-list.tsx';
import { PublishSheet } from '#components/allocation/publish-sheet.tsx';
import { TimeLimit } from '#components/allocation/time-limit.tsx';
import { DayPlaces } from '#components/office/day-places.tsx';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { allocationModelHref, useAllocation } from '#hooks/allocation.ts';
import { useCuttingDay } from '#hooks/carcases.ts';
import { useSpecification } from '#hooks/specifications.ts';
import { useTitle } from '#hooks/use-title.ts';
import { useWorkbench } from '#hooks/use-workbench.ts';
import type { Allocation } from '#shared/contracts/allocation.ts';
import { formatCount, formatDay } from '#shared/domain/words.ts';

export default function AllocationScreen() {
  const { dayId } = useLocalSearchParams<{ dayId: string }>();
  const allocation = useAllocation(dayId);
  const day = useCuttingDay(dayId);
  const specification = useSpecification(day.data?.specificationId);
  const members = narrowMembers(specification.data?.body);
  return (
    <StateView
      query={allocation}
      what="the allocation"
      waiting={<Skeleton shape="rail" />}
      missing={{ title: 'No such cutting day', words: 'Look for it in the list of cutting days.' }}
    >
      {({ latest, published }) => (
        <Workbench
          dayId={dayId}
          day={day.data?.day}
          carcases={day.data?.carcases.length ?? 0}
          latest={latest}
          published={published}
          members={members}
        />
      )}
    </StateView>
  );
}

type WorkbenchProps = {
  dayId: string;
  day: string | undefined;
  carcases: number;
  latest: Allocation | null;
  published: Allocation | null;
  members: Members;
};

function Workbench({ dayId, day, carcases, latest, published, members }: WorkbenchProps) {
  const bench = useWorkbench(dayId, latest);
  const [isPublishing, setPublishing] = useState(false);
  useTitle(day ? `Allocation ${formatDay(day)}` : 'Allocation');
  const isUnsaved = latest !== null && !areSameLocks(bench.locks, latest.locks);
  const mayPublish = latest?.state === 'draft' && latest.isProven && !isUnsaved && !bench.plan.isWorking;
  const workOut = (
    <Button
      kind={mayPublish ? 'quiet' : 'primary'}
      label={latest ? 'Work it out again' : 'Work it out'}
      busy={bench.plan.isWorking}
      busyLabel="Working it out …"
      onPress={bench.workOut}
    />
  );
  const path = `/office/cutting-days/${dayId}/allocation`;
  const above = latest
    ? describePlan(latest)
    : day && `Cutting day ${formatDay(day)} · ${formatCount(carcases, 'carcase')}`;
  return (
    <View style={css('w-stack-l')}>
      {latest ? <PrintedList plan={latest} /> : null}
      <View style={css('w-stack-l', 'w-no-print')}>
        <TitleBar
          title="Allocation"
          above={above}
          actions={
            <>
              {latest ? workOut : null}
              {latest && mayPublish ? (
                <Button
                  label={`Publish ${formatCount(boxesOnSale(latest), 'box', 'boxes')}`}
                  onPress={() => setPublishing(true)}
                />
              ) : null}
            </>
          }
        />
        <DayPlaces dayId={dayId} role="owner" path={path} />
        {bench.plan.isWorking ? null : <TimeLimit seconds={bench.seconds} onChange={bench.setSeconds} />}
        <JobPanel {...bench.plan} onCancel={bench.plan.cancel} />
        {isUnsaved && !bench.plan.isWorking ? (
          <Notice kind="held" spoken title="The locks have changed." next="Work it out again to see what they cost." />
        ) : null}
        {bench.hasPublished && latest?.state === 'published' ? (
          <Notice kind="good" spoken title={`On sale now: ${describeOutlets(latest)}.`} />
        ) : null}
        {latest ? (
          <PlanView
            plan={latest}
            members={members}
            chosen={bench.chosen}
            onChoose={bench.setChosen}
            locks={bench.locks}
            onLocks={bench.setLocks}
            before={bench.before}
            links={<PlanLinks dayId={dayId} plan={latest} />}
          />
        ) : (
          <EmptyState
            title="Not allocated yet"
            words="The plan finds how each primal is best cut, how many boxes of each kind that gives, and what goes to butchers, loose packs and mince."
          >
            {workOut}
          </EmptyState>
        )}
        {latest ? (
          <PublishSheet
            open={isPublishing}
            plan={latest}
            published={published}
            busy={bench.publish.isPending}
            error={bench.publish.error}
            onPublish={() => void bench.putOnSale(latest).then((isDone) => setPublishing(!isDone))}
            onClose={() => setPublishing(false)}
          />
        ) : null}
      </View>
    </View>
  );
}

function PlanLinks({ dayId, plan }: { dayId: string; plan: Allocation }) {
  return (
    <>
      <TextLink href={`/office/cutting-days/${dayId}/margin`} place="alone">
        Where the money comes from
      </TextLink>
      <TextLink href={`/office/cutting-days/${dayId}/what-if`} place="alone">
        What if …
      </TextLink>
      <TextLink href={allocationModelHref(plan.id, 'lp')} outside place="alone">
        Save the model as an LP file
      </TextLink>
      <TextLink href={allocationModelHref(plan.id, 'mps')} outside place="alone">
        Save the model as an MPS file
      </TextLink>
      <View style={css('w-row')}>
        <Button kind="quiet" small label="Print the cutting list" onPress={() => window.print()} />
      </View>
    </>
  );
}
