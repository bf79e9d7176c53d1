import { View } from 'react-native';
import { useController, type Control } from 'react-hook-form';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { Checkbox } from '#components/ui/checkbox.tsx';
import { Disclosure } from '#components/ui/disclosure.tsx';
import { FieldError } from '#components/ui/field-frame.tsx';
import { FormNumber } from '#components/ui/form-number.tsx';
import { FormText } from '#components/ui/form-text.tsx';
import type { BoxKindEdit, Cut } from '#shared/contracts/office.ts';

type BoxLineFieldsProps = {
  control: Control<BoxKindEdit>;
  at: number;
  cuts: readonly Cut[];
  /** None for the last line: a box needs one. */
  onRemove: (() => void) | undefined;
};

/** One line of a recipe: how much of which cuts. */
export function BoxLineFields({ control, at, cuts, onRemove }: BoxLineFieldsProps) {
  const { field, fieldState } = useController({ control, name: `lines.${at}.cutIds` });
  const chosen = cuts.filter((cut) => field.value.includes(cut.id)).map((cut) => cut.name);
  const choose = (cutId: string, isChosen: boolean) =>
    field.onChange(isChosen ? [...field.value, cutId] : field.value.filter((other) => other !== cutId));
  return (
    <View role="group" aria-label={`Line ${at + 1}`} style={css('w-stack')}>
      <FormText control={control} name={`lines.${at}.name`} label="Line" />
      <View style={css('w-fields')}>
        <FormNumber control={control} name={`lines.${at}.minGrams`} unit="kilograms" label="At least" />
        <FormNumber control={control} name={`lines.${at}.maxGrams`} unit="kilograms" label="At most" />
        <FormNumber control={control} name={`lines.${at}.minPacks`} unit="count" label="Packs, at least" />
        <FormNumber control={control} name={`lines.${at}.maxPacks`} unit="count" label="Packs, at most" optional />
      </View>
      <Disclosure words={`From: ${chosen.join(', ') || 'no cut chosen yet'}`}>
        <View role="group" aria-label={`Cuts of line ${at + 1}`} style={css('w-fields')}>
          {cuts.map((cut) => (
            <Checkbox
              key={cut.id}
              label={cut.name}
              checked={field.value.includes(cut.id)}
              onChange={(isChosen) => choose(cut.id, isChosen)}
            />
          ))}
        </View>
      </Disclosure>
      <FieldError id={`line-${at}-cuts-error`} error={fieldState.error?.message} />
      {onRemove ? (
        <View style={css('w-row')}>
          <Button kind="quiet" small label="Take out" name={`Take out line ${at + 1}`} onPress={onRemove} />
        </View>
      ) : null}
    </View>
  );
}
