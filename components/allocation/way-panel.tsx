import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { RadioGroup, type Choice } from '#components/ui/radio-group.tsx';
import { SmallCaps } from '#components/ui/small-caps.tsx';
import { Text } from '#components/ui/text.tsx';
import type { Lock, PlannedChoice, PlannedSide } from '#shared/contracts/allocation.ts';
import { formatMoney } from '#shared/domain/words.ts';
import { choicesOf, findLock } from './locks.ts';
import { nameSide } from './plan-words.ts';

/** The choice that leaves the way to the plan. */
const FREE = 'free';

const PANEL_ID = 'ways';

/** Takes the reader to the panel once it is drawn. */
export function goToWays(): void {
  requestAnimationFrame(() => document.getElementById(PANEL_ID)?.focus());
}

type WayPanelProps = {
  side: PlannedSide;
  primalIds: readonly string[];
  /** The locks as they are set on the screen, worked out or not. */
  locks: readonly Lock[];
  /** False while the cost of the locks is still being worked out. */
  isExplained: boolean;
  onLock: (choiceId: string, wayId: string | undefined) => void;
};

/** How one primal of one side is cut, and the owner's hand on it. */
export function WayPanel({ side, primalIds, locks, isExplained, onLock }: WayPanelProps) {
  const choices = choicesOf(side, primalIds);
  return (
    <View
      role="region"
      id={PANEL_ID}
      tabIndex={-1}
      aria-label={`Ways of ${nameSide(side)}`}
      style={css('w-panel', 'w-stack')}
    >
      {choices.length === 0 ? <Text>This primal is cut in one way only.</Text> : null}
      {choices.map((choice) => {
        const lock = findLock(locks, { carcaseId: side.carcaseId, side: side.side, choiceId: choice.choiceId });
        return (
          <View key={choice.choiceId} style={css('w-stack-s')}>
            <SmallCaps level={3}>{`${choice.name}, ${nameSide(side)}${lock ? ' · locked' : ''}`}</SmallCaps>
            <RadioGroup
              label="Cut as"
              value={lock?.wayId ?? FREE}
              choices={[freeChoice(choice), ...choice.ways.map((way) => wayChoice(choice, way, lock))]}
              onChange={(value) => onLock(choice.choiceId, value === FREE ? undefined : value)}
            />
            {choice.isLocked && lock?.wayId === choice.wayId ? (
              <LockCost pence={choice.lockCostPence} isExplained={isExplained} />
            ) : null}
          </View>
        );
      })}
    </View>
  );
}

function freeChoice(choice: PlannedChoice): Choice {
  const planned = choice.ways.find((way) => way.wayId === choice.wayId);
  const words = choice.soldTo ? `sold whole to ${choice.soldTo}` : planned?.name.toLowerCase();
  return {
    value: FREE,
    label: 'As the plan finds best',
    note: choice.isLocked || words === undefined ? undefined : `Now: ${words}`,
  };
}

function wayChoice(choice: PlannedChoice, way: PlannedChoice['ways'][number], lock: Lock | undefined): Choice {
  const isCut = choice.wayId === way.wayId;
  return {
    value: way.wayId,
    label: way.name,
    note: way.closedReason ?? undefined,
    disabled: way.closedReason !== null,
    end: lock?.wayId === way.wayId ? 'locked' : isCut ? 'planned' : undefined,
  };
}

function LockCost({ pence, isExplained }: { pence: number | null; isExplained: boolean }) {
  if (pence === null) return isExplained ? null : <Text live="status">What this lock costs is being worked out …</Text>;
  return (
    <Text weight="bold" figures live="status">
      {pence > 0 ? `This lock costs ${formatMoney(pence)}.` : 'This lock costs nothing.'}
    </Text>
  );
}
