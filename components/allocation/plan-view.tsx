import type { ReactNode } from 'react';
import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { useBreakpoint } from '#components/theme/use-breakpoint.ts';
import { Disclosure } from '#components/ui/disclosure.tsx';
import { Heading } from '#components/ui/heading.tsx';
import type { Allocation, Lock, PlannedSide } from '#shared/contracts/allocation.ts';
import { CompareTable } from './compare-table.tsx';
import { CutTable } from './cut-table.tsx';
import { setLock, type Members } from './locks.ts';
import { OfferList } from './offer-list.tsx';
import { Outlets } from './outlets.tsx';
import { PlanFigures } from './plan-figures.tsx';
import { PlanNotices } from './plan-notices.tsx';
import { SideRails } from './side-rails.tsx';
import { goToWays, WayPanel } from './way-panel.tsx';
import { WaysSection } from './ways-section.tsx';

type Chosen = { carcaseId: string; side: PlannedSide['side']; primalId: string };

type PlanViewProps = {
  plan: Allocation;
  members: Members;
  chosen: Chosen | undefined;
  onChoose: (chosen: Chosen) => void;
  /** As they are set on the screen, worked out or not. */
  locks: readonly Lock[];
  onLocks: (locks: Lock[]) => void;
  /** The answer before this one, for what changed. */
  before: Allocation | null;
  /** Links to what belongs to this plan. */
  links: ReactNode;
};

/** A plan to look through: rails, boxes on offer, money, cuts, and the way of each primal. */
export function PlanView({ plan, members, chosen, onChoose, locks, onLocks, before, links }: PlanViewProps) {
  const isBeside = useBreakpoint() === 'office';
  const side = plan.sides.find((one) => one.carcaseId === chosen?.carcaseId && one.side === chosen.side);
  const choose = ({ carcaseId, side: which }: PlannedSide, primalId: string) =>
    onChoose({ carcaseId, side: which, primalId });
  const panel = chosen && side && (
    <WayPanel
      side={side}
      primalIds={members[chosen.primalId] ?? [chosen.primalId]}
      locks={locks}
      isExplained={plan.isExplained}
      onLock={(choiceId, wayId) => onLocks(setLock(locks, { ...chosen, choiceId }, wayId))}
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
          <View>{links}</View>
        </View>
      </View>
      {before ? (
        <CompareTable beforeTitle="The answer before" nowTitle="This answer" before={before} now={plan} />
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
