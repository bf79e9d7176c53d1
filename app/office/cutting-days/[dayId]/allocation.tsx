import { useLocalSearchParams } from 'expo-router';
import { useState } from 'react';
import { View } from 'react-native';
import { CompareTable } from '#components/allocation/compare-table.tsx';
import { CutTable } from '#components/allocation/cut-table.tsx';
import { areSameLocks, narrowMembers, setLock, type Members } from '#components/allocation/locks.ts';
import { OfferList } from '#components/allocation/offer-list.tsx';
import { describeOutlets, Outlets } from '#components/allocation/outlets.tsx';
import { PlanFigures } from '#components/allocation/plan-figures.tsx';
import { PlanNotices } from '#components/allocation/plan-notices.tsx';
import { boxesOnSale, describePlan } from '#components/allocation/plan-words.ts';
import { PublishSheet } from '#components/allocation/publish-sheet.tsx';
import { SideRails } from '#components/allocation/side-rails.tsx';
import { goToWays, WayPanel } from '#components/allocation/way-panel.tsx';
import { WaysSection } from '#components/allocation/ways-section.tsx';
import { DayPlaces } from '#components/office/day-places.tsx';
import { css } from '#components/theme/css.ts';
import { useBreakpoint } from '#components/theme/use-breakpoint.ts';
import { Button } from '#components/ui/button.tsx';
import { Disclosure } from '#components/ui/disclosure.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { allocationModelHref, useAllocation } from '#hooks/allocation.ts';
import { useCuttingDay, useSpecification } from '#hooks/carcases.ts';
import { useTitle } from '#hooks/use-title.ts';
import { useWorkbench } from '#hooks/use-workbench.ts';
import type { Allocation, PlannedSide } from '#shared/contracts/allocation.ts';
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
  const mayPublish = latest?.state === 'draft' && !isUnsaved;
  const workOut = (
    <Button
      kind={mayPublish ? 'quiet' : 'primary'}
      label={latest ? 'Work it out again' : 'Work it out'}
      busy={bench.allocate.isPending}
      busyLabel="Working it out …"
      onPress={() => void bench.workOut()}
    />
  );
  const path = `/office/cutting-days/${dayId}/allocation`;
  const above = latest
    ? describePlan(latest)
    : day && `Cutting day ${formatDay(day)} · ${formatCount(carcases, 'carcase')}`;
  return (
    <View style={css('w-stack-l')}>
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
      <ProblemNotice error={bench.allocate.error} title="There is no new answer." />
      {isUnsaved ? (
        <Notice kind="held" spoken title="The locks have changed." next="Work it out again to see what they cost." />
      ) : null}
      {bench.hasPublished && latest?.state === 'published' ? (
        <Notice kind="good" spoken title={`On sale now: ${describeOutlets(latest)}.`} />
      ) : null}
      {latest ? (
        <Plan plan={latest} bench={bench} members={members} />
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
  );
}

type PlanProps = { plan: Allocation; bench: ReturnType<typeof useWorkbench>; members: Members };

function Plan({ plan, bench, members }: PlanProps) {
  const isBeside = useBreakpoint() === 'office';
  const { chosen } = bench;
  const side = plan.sides.find((one) => one.carcaseId === chosen?.carcaseId && one.side === chosen.side);
  const choose = ({ carcaseId, side: which }: PlannedSide, primalId: string) =>
    bench.setChosen({ carcaseId, side: which, primalId });
  const panel = chosen && side && (
    <WayPanel
      side={side}
      primalIds={members[chosen.primalId] ?? [chosen.primalId]}
      locks={bench.locks}
      isExplained={plan.isExplained}
      onLock={(choiceId, wayId) => bench.setLocks(setLock(bench.locks, { ...chosen, choiceId }, wayId))}
    />
  );
  return (
    <>
      <PlanNotices plan={plan} />
      <View style={css('w-columns', 'w-columns-office')}>
        <SideRails
          sides={plan.sides}
          members={members}
          chosen={chosen && side && { side, primalId: chosen.primalId }}
          onChoose={choose}
          panelBelow={isBeside ? null : panel}
          isNaming={!isBeside}
        />
        <View style={css('w-stack-l')}>
          {isBeside && panel ? <div style={{ position: 'sticky', top: 16, zIndex: 1 }}>{panel}</div> : null}
          <View>
            <Heading level={2}>On offer</Heading>
            <OfferList boxes={plan.boxes} isExplained={plan.isExplained} />
          </View>
          <PlanFigures plan={plan} />
          <TextLink href={allocationModelHref(plan.id)} outside place="alone">
            Save the model as a file
          </TextLink>
        </View>
      </View>
      {bench.before ? (
        <CompareTable beforeTitle="The answer before" nowTitle="This answer" before={bench.before} now={plan} />
      ) : null}
      <Heading level={2}>Cuts and where they go</Heading>
      <Disclosure words="Kilograms of each cut" ruled open={isBeside}>
        <CutTable cuts={plan.cuts} />
      </Disclosure>
      <Outlets loose={plan.loose} trade={plan.trade} />
      <WaysSection
        sides={plan.sides}
        onChoose={(one, primalId) => {
          choose(one, primalId);
          goToWays();
        }}
      />
    </>
  );
}
