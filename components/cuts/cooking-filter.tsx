import type { Cooking, LooseCut } from '#shared/contracts/shop.ts';
import { ChipGroup } from '#components/ui/chip-group.tsx';

export type CookingChoice = Cooking | 'all';

const words = {
  all: 'All',
  grill: 'Grill or pan',
  roast: 'Roast',
  'pot-roast': 'Pot-roast',
  braise: 'Braise',
  mince: 'Mince',
} as const satisfies Record<CookingChoice, string>;

const order = Object.keys(words).filter(isChoice);

function isChoice(value: string): value is CookingChoice {
  return value in words;
}

type CookingFilterProps = {
  cuts: readonly LooseCut[];
  value: CookingChoice;
  onChange: (choice: CookingChoice) => void;
};

/** Filters by how a cut is cooked: people know their supper before they know the name of a muscle. */
export function CookingFilter({ cuts, value, onChange }: CookingFilterProps) {
  const offered = order.filter((choice) => choice === 'all' || cuts.some((cut) => cut.cooking === choice));
  return (
    <ChipGroup
      label="How will you cook it?"
      value={value}
      chips={offered.map((choice) => ({ value: choice, label: words[choice] }))}
      onChange={(choice) => {
        if (isChoice(choice)) onChange(choice);
      }}
    />
  );
}
