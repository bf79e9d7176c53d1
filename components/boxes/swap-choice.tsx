import type { Box } from '#shared/contracts/shop.ts';
import { RadioGroup } from '#components/ui/radio-group.tsx';

type SwapChoiceProps = {
  box: Box;
  dayId: string | undefined;
  /** The slug of what is chosen: the box itself, or one of its swaps. */
  slug: string;
  onSlug: (slug: string) => void;
};

/** The box as it is, or one of its swaps at the same price, while there are some of it. */
export function SwapChoice({ box, dayId, slug, onSlug }: SwapChoiceProps) {
  if (box.swaps.length === 0) return null;
  const freeOf = (offers: Box['offers']) => offers.find((offer) => offer.dayId === dayId)?.free ?? 0;
  return (
    <RadioGroup
      label="As it is, or with a swap at the same price"
      ruled
      value={slug}
      onChange={onSlug}
      choices={[
        { value: box.slug, label: 'As it is', note: box.summary },
        ...box.swaps.map((swap) => ({
          value: swap.slug,
          label: swap.name,
          note: swap.summary,
          disabled: freeOf(swap.offers) === 0 && swap.slug !== slug,
          end: freeOf(swap.offers) === 0 ? 'none left' : undefined,
        })),
      ]}
    />
  );
}
