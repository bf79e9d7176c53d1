import { DefinitionList } from '#components/ui/definition-list.tsx';
import { Money } from '#components/ui/money.tsx';
import type { Allocation } from '#shared/contracts/allocation.ts';
import { formatMoney, formatWeight } from '#shared/domain/words.ts';
import { leftOverGrams, perColdKg } from './plan-words.ts';

/** What the plan is worth, beside what the same carcases would bring sold deadweight. */
export function PlanFigures({ plan }: { plan: Allocation }) {
  return (
    <DefinitionList
      items={[
        {
          term: 'Contribution',
          value: <Money pence={plan.contributionPence} look="price" />,
          note: `${perColdKg(plan.contributionPence, plan)} of cold deadweight`,
        },
        {
          term: 'Deadweight value',
          value: formatMoney(plan.deadweightPence),
          note: perColdKg(plan.deadweightPence, plan),
        },
        { term: 'Gain', value: formatMoney(plan.gainPence), note: perColdKg(plan.gainPence, plan), strong: true },
        { term: 'Left over', value: formatWeight(leftOverGrams(plan)) },
        {
          term: plan.isProven ? 'Proven within' : 'Best so far, within',
          value: `${(plan.gapBasisPoints / 100).toFixed(2)} %`,
        },
        ...(plan.promise ? [{ term: 'Can be filled', value: `${plan.promise.confidencePercent} % sure` }] : []),
        { term: 'Worked out in', value: `${(plan.solveMs / 1000).toFixed(1)} s` },
      ]}
    />
  );
}
