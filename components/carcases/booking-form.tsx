import { useState } from 'react';
import { View } from 'react-native';
import { useController, type Control } from 'react-hook-form';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { Checkbox } from '#components/ui/checkbox.tsx';
import { Field } from '#components/ui/field.tsx';
import { FieldError } from '#components/ui/field-frame.tsx';
import { FormDay } from '#components/ui/form-day.tsx';
import { FormFrame } from '#components/ui/form-frame.tsx';
import { Text } from '#components/ui/text.tsx';

export type Booking = { animalIds: string[]; killDay: string; cuttingDayId: string };

type BookingFormProps = {
  control: Control<Booking>;
  /** Animals in the field, the oldest first. */
  animals: readonly { id: string; label: string; note: string }[];
  latestKillDay: string;
  onSubmit: () => void;
  busy: boolean;
};

/** So many animals are listed at once; the rest is found by tag. */
const SHOWN = 12;

/** Chooses animals from the field for a kill day; they hang until the cutting day. */
export function BookingForm({ control, animals, latestKillDay, onSubmit, busy }: BookingFormProps) {
  const { field, fieldState } = useController({ control, name: 'animalIds' });
  const [typed, setTyped] = useState('');
  const chosen = new Set(field.value);
  const wanted = typed.replace(/\s/g, '').toLowerCase();
  const found = animals.filter(({ id, label }) => {
    return chosen.has(id) || label.replace(/\s/g, '').toLowerCase().includes(wanted);
  });
  const shown = [...found.filter(({ id }) => chosen.has(id)), ...found.filter(({ id }) => !chosen.has(id))];
  const choose = (id: string, isChosen: boolean) =>
    field.onChange(isChosen ? [...field.value, id] : field.value.filter((other) => other !== id));
  return (
    <FormFrame name="Book animals" onSubmit={onSubmit}>
      <View style={css('w-fields')}>
        <FormDay control={control} name="killDay" label="Kill day" max={latestKillDay} />
        <Field label="Find by ear tag" required={false} value={typed} onChangeText={setTyped} />
      </View>
      <View role="group" aria-label="Animals in the field" style={css('w-tiles')}>
        {shown.slice(0, SHOWN + chosen.size).map(({ id, label, note }) => (
          <Checkbox
            key={id}
            label={label}
            note={note}
            checked={chosen.has(id)}
            onChange={(isChosen) => choose(id, isChosen)}
          />
        ))}
      </View>
      <FieldError id="animals-error" error={fieldState.error?.message} />
      {shown.length > SHOWN + chosen.size ? (
        <Text size="small" tone="quiet">{`${shown.length - SHOWN - chosen.size} more are found by their tag.`}</Text>
      ) : null}
      <View style={css('w-buttons')}>
        <Button
          label={chosen.size > 0 ? `Book ${chosen.size}` : 'Book'}
          name={`Book ${chosen.size} for the kill day`}
          busy={busy}
          onPress={onSubmit}
        />
      </View>
    </FormFrame>
  );
}
