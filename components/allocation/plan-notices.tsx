import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Notice } from '#components/ui/notice.tsx';
import { Text } from '#components/ui/text.tsx';
import type { Allocation } from '#shared/contracts/allocation.ts';
import { formatWeight } from '#shared/domain/words.ts';

/** What the owner must know before trusting or publishing the plan. */
export function PlanNotices({ plan }: { plan: Allocation }) {
  return (
    <>
      {plan.isOutOfDate ? (
        <Notice
          kind="held"
          title="Weights or carcases have changed since this was worked out."
          kept="What is on sale stays as it is until you publish a new plan."
          next="Work it out again."
        />
      ) : null}
      {plan.cautions.map((caution) => (
        <Notice key={caution} kind="held" title={caution} />
      ))}
      {plan.unpriced.length > 0 ? (
        <Notice
          kind="held"
          title="A carcase has no deadweight value."
          kept={plan.unpriced.join(' ')}
          next="The gain counts it as worth nothing deadweight until the price grid has its class."
        />
      ) : null}
      {plan.isProven ? null : (
        <Notice
          kind="held"
          title="This is the best answer found in time, but it is not proven to be the best there is."
          next="Work it out again before publishing."
        />
      )}
      {plan.promise?.isFloorAtRisk ? (
        <Notice
          kind="held"
          title="What is sold already may not be filled, if the carcases come out light."
          kept={`At worst ${formatWeight(plan.promise.worstShortGrams)} would be missing.`}
          next="Sell no more of it, or book another animal. Weights settle it."
        />
      ) : null}
      {plan.shortfalls.length > 0 ? (
        <Notice
          kind="error"
          title="These carcases cannot give all that is promised."
          next="Book another animal, take off a lock, or settle with those who ordered. Nothing is cancelled by itself."
        >
          <View style={css('w-stack-s')}>
            {plan.shortfalls.map((short) => (
              <Text key={short.name} weight="strong">{`${short.name}: ${short.missing} missing`}</Text>
            ))}
          </View>
        </Notice>
      ) : null}
    </>
  );
}
