import { View } from 'react-native';
import type { Control } from 'react-hook-form';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { FormCheckbox } from '#components/ui/form-checkbox.tsx';
import { FormFrame } from '#components/ui/form-frame.tsx';
import { FormNumber } from '#components/ui/form-number.tsx';
import { Text } from '#components/ui/text.tsx';
import type { Reservation } from '#shared/contracts/trade.ts';
import { formatWeight } from '#shared/domain/words.ts';

export type Dispatch = {
  version: number;
  weights: { lineId: string; grams: number }[];
  isShortAccepted: boolean;
};

type DispatchFormProps = {
  control: Control<Dispatch>;
  reservation: Reservation;
  onSubmit: () => void;
  busy: boolean;
};

/** Every piece that leaves whole on the scale; cuts leave in the packs that were filled for them. */
export function DispatchForm({ control, reservation, onSubmit, busy }: DispatchFormProps) {
  const pieces = reservation.lines.filter((line) => line.kind === 'unit');
  const cuts = reservation.lines.filter((line) => line.kind === 'cut');
  return (
    <FormFrame name={`Dispatch reservation ${reservation.reservationNo}`} onSubmit={onSubmit}>
      {pieces.map((line, index) => (
        <FormNumber
          key={line.id}
          control={control}
          name={`weights.${index}.grams`}
          unit="kilograms"
          label={`${line.name} on the scale`}
          hint={`${line.earTag ? `From ${line.earTag}${line.side ? `, ${line.side} side` : ''}. ` : ''}Estimated ${formatWeight(line.grams)}.`}
        />
      ))}
      {cuts.length > 0 ? (
        <View style={css('w-stack-s')}>
          {cuts.map((line) => (
            <Text key={line.id}>{`${line.name}: ${formatWeight(line.grams)} reserved, leaves in its packs.`}</Text>
          ))}
          <FormCheckbox
            control={control}
            name="isShortAccepted"
            label="Send what is packed, even if it is less"
            note="Without this, nothing leaves while a cut is short."
          />
        </View>
      ) : null}
      <Button wide label="Dispatch" busy={busy} busyLabel="Dispatching …" onPress={onSubmit} />
    </FormFrame>
  );
}
