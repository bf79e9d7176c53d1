import { View } from 'react-native';
import { useFieldArray, type Control } from 'react-hook-form';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { FormCheckbox } from '#components/ui/form-checkbox.tsx';
import { FormFrame } from '#components/ui/form-frame.tsx';
import { FormNumber } from '#components/ui/form-number.tsx';
import { FormText } from '#components/ui/form-text.tsx';
import { Heading } from '#components/ui/heading.tsx';
import type { BoxKindEdit, Cut } from '#shared/contracts/office.ts';
import { BoxLineFields } from './box-line-fields.tsx';

type BoxKindFormProps = {
  control: Control<BoxKindEdit>;
  cuts: readonly Cut[];
  onSubmit: () => void;
  busy: boolean;
};

/** What a box is called, costs and promises, line by line. */
export function BoxKindForm({ control, cuts, onSubmit, busy }: BoxKindFormProps) {
  const lines = useFieldArray({ control, name: 'lines' });
  return (
    <FormFrame name="Kind of box" onSubmit={onSubmit}>
      <View style={css('w-fields')}>
        <FormText control={control} name="name" label="Name" />
        <FormText control={control} name="summary" label="In one line" />
      </View>
      <View style={css('w-fields')}>
        <FormNumber control={control} name="pricePence" unit="pounds" label="Price" />
        <FormNumber control={control} name="guaranteedGrams" unit="kilograms" label="Weighs at least" />
        <FormNumber control={control} name="packagingPence" unit="pounds" label="Packaging costs" />
        <FormNumber
          control={control}
          name="demandBoxes"
          unit="count"
          label="Likely to sell"
          hint="Boxes a cutting day, at this price."
        />
      </View>
      <FormCheckbox control={control} name="isActive" label="Offered from the next plan on" />
      <Heading level={2}>Recipe</Heading>
      <View style={css('w-rows')}>
        {lines.fields.map((field, at) => (
          <BoxLineFields
            key={field.id}
            control={control}
            at={at}
            cuts={cuts}
            onRemove={lines.fields.length > 1 ? () => lines.remove(at) : undefined}
          />
        ))}
      </View>
      <View style={css('w-buttons')}>
        <Button label="Save this box" busy={busy} onPress={onSubmit} />
        <Button
          kind="quiet"
          label="Add a line"
          icon="plus"
          onPress={() =>
            lines.append({ name: '', minGrams: 0, maxGrams: 1000, minPacks: 1, maxPacks: null, cutIds: [] })
          }
        />
      </View>
    </FormFrame>
  );
}
