import { useState } from 'react';
import type { Order } from '#shared/contracts/orders.ts';
import { RadioGroup } from '#components/ui/radio-group.tsx';
import { Stepper } from '#components/ui/stepper.tsx';
import { Text } from '#components/ui/text.tsx';
import { ChangeSheet } from './change-sheet.tsx';

type Line = Order['lines'][number];
export type ChosenSwap = { lineId: string; offerId: string; quantity: number };

type SwapSheetProps = {
  line: Line;
  onClose: () => void;
  onSwap: (swap: ChosenSwap) => void;
  isSwapping: boolean;
  refusal: string | undefined;
};

/** Which variant of the box instead, and for how many of them. */
export function SwapSheet({ line, onClose, onSwap, isSwapping, refusal }: SwapSheetProps) {
  const [offerId, setOfferId] = useState<string>();
  const [wanted, setWanted] = useState(line.quantity);
  const chosen = line.swaps.find((swap) => swap.offerId === offerId);
  const most = Math.min(line.quantity, chosen?.free ?? line.quantity);
  const quantity = Math.min(wanted, most);
  return (
    <ChangeSheet
      open
      onClose={onClose}
      title={`Swap ${line.name}`}
      doLabel="Swap it"
      busyLabel="Swapping …"
      isBusy={isSwapping}
      isReady={chosen !== undefined}
      onDo={() => {
        if (chosen) onSwap({ lineId: line.id, offerId: chosen.offerId, quantity });
      }}
      refusal={refusal}
    >
      <Text tone="quiet">The price and the guaranteed weight stay the same.</Text>
      <RadioGroup
        label="What would you like instead?"
        ruled
        value={offerId}
        onChange={setOfferId}
        choices={line.swaps.map((swap) => ({
          value: swap.offerId,
          label: swap.name,
          note: swap.summary,
          end: `${swap.free} left`,
        }))}
      />
      {line.quantity > 1 ? (
        <Stepper label={`${line.name} to swap`} value={quantity} min={1} max={most} onChange={setWanted} />
      ) : null}
    </ChangeSheet>
  );
}
