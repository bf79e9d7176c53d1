import { DefinitionList, type Definition } from '#components/ui/definition-list.tsx';
import type { Costs, Margin } from '#shared/contracts/margin.ts';
import { formatGrams, formatMoney, formatRate } from '#shared/domain/words.ts';

const COST_NAMES: Record<keyof Costs, string> = {
  killPence: 'Kill',
  inspectionPence: 'Inspection',
  levyPence: 'Levy',
  haulagePence: 'Haulage',
  butcheryPence: 'Butchery',
  packingPence: 'Packing and mincing',
  deliveryPence: 'Delivery',
  cardFeesPence: 'Card fees',
  refundsPence: 'Refunds',
};

/** How a margin comes about, line by line down to the gain. */
export function MarginSum({ margin }: { margin: Margin }) {
  const costs = (Object.keys(COST_NAMES) as (keyof Costs)[])
    .filter((name) => margin.costs[name] !== 0)
    .map((name): Definition => ({ term: COST_NAMES[name], value: less(margin.costs[name]) }));
  const { coldGrams } = margin;
  const perKg = (rate: number) => `${formatRate(rate)} over ${formatGrams(coldGrams)} of cold deadweight`;
  return (
    <DefinitionList
      ruled
      items={[
        { term: 'Income', value: formatMoney(margin.incomePence) },
        ...costs,
        {
          term: 'Contribution',
          value: formatMoney(margin.contributionPence),
          note: perKg(margin.contributionPerKg),
          strong: true,
        },
        { term: 'Deadweight value', value: less(margin.deadweightPence), note: perKg(margin.deadweightPerKg) },
        { term: 'Gain', value: formatMoney(margin.gainPence), note: perKg(margin.gainPerKg), strong: true },
      ]}
    />
  );
}

function less(pence: number): string {
  return `− ${formatMoney(pence)}`;
}
