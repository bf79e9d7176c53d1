import { View } from 'react-native';
import { useController, type Control } from 'react-hook-form';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { FieldError } from '#components/ui/field-frame.tsx';
import { FormFrame } from '#components/ui/form-frame.tsx';
import { FormText } from '#components/ui/form-text.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { Money } from '#components/ui/money.tsx';
import { Text } from '#components/ui/text.tsx';
import type { NewReservation, TradeDay } from '#shared/contracts/trade.ts';
import { CutChoice } from './cut-choice.tsx';
import { describeBeast, estimatePence, nameBeast } from './trade-words.ts';
import { UnitChoice } from './unit-choice.tsx';

type ReserveFormProps = {
  control: Control<NewReservation>;
  day: TradeDay;
  onSubmit: () => void;
  busy: boolean;
};

/** What a butcher takes of one cutting day, whole and by the kilogram, with a note to the cutter. */
export function ReserveForm({ control, day, onSubmit, busy }: ReserveFormProps) {
  const { field, fieldState } = useController({ control, name: 'lines' });
  return (
    <FormFrame name="Reserve" onSubmit={onSubmit}>
      {day.carcases.map((carcase) => (
        <View key={carcase.id} style={css('w-stack', 'w-ruled')}>
          <View>
            <Heading level={2}>{nameBeast(carcase)}</Heading>
            <Text tone="quiet">{describeBeast(carcase)}</Text>
          </View>
          <UnitChoice carcase={carcase} lines={field.value} onChange={field.onChange} />
        </View>
      ))}
      <View style={css('w-stack', 'w-ruled')}>
        <Heading level={2}>Cuts by the kilogram</Heading>
        <CutChoice cuts={day.cuts} lines={field.value} onChange={field.onChange} />
      </View>
      <View style={css('w-stack', 'w-ruled')}>
        <FormText
          control={control}
          name="cuttingNote"
          label="Note to the cutter"
          hint="As: chine bone off, shin left whole."
          optional
          multiline
          maxLength={500}
        />
        <View style={css('w-row-between')}>
          <Text weight="strong">About, at the weights known now</Text>
          <Money pence={estimatePence(field.value, day)} look="price-large" />
        </View>
        <Text size="small" tone="quiet">
          Charged is what the scale or the kill sheet says, at your own prices.
        </Text>
        <FieldError id="lines-error" error={messageOf(fieldState.error)} />
        <Button label="Reserve" wide busy={busy} busyLabel="Asking the plan …" onPress={onSubmit} />
      </View>
    </FormFrame>
  );
}

type ListError = { message?: string; root?: { message?: string } } | undefined;

/** Of a list, the form keeps the whole's error apart from those of its rows. */
function messageOf(error: ListError): string | undefined {
  if (!error) return undefined;
  return error.message ?? error.root?.message ?? 'One of the weights is not right. Look at the cuts again.';
}
