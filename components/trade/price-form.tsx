import { View } from 'react-native';
import { useFieldArray, type Control } from 'react-hook-form';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { FormFrame } from '#components/ui/form-frame.tsx';
import { FormNumber } from '#components/ui/form-number.tsx';
import { FormSelect } from '#components/ui/form-select.tsx';
import { Text } from '#components/ui/text.tsx';
import type { TradePrice } from '#shared/contracts/trade.ts';

export type PriceList = { version: number; prices: Omit<TradePrice, 'name'>[] };

type PriceFormProps = {
  control: Control<PriceList>;
  /** What may stand on a price list. */
  products: readonly { value: string; label: string }[];
  onSubmit: () => void;
  busy: boolean;
};

const bases = [
  { value: 'scale weight', label: 'the scale on cutting day' },
  { value: 'cold weight', label: "the kill sheet's cold weight" },
];

/** One butcher's own prices. What has no price cannot be reserved. */
export function PriceForm({ control, products, onSubmit, busy }: PriceFormProps) {
  const prices = useFieldArray({ control, name: 'prices' });
  return (
    <FormFrame name="Price list" onSubmit={onSubmit}>
      {prices.fields.length === 0 ? <Text tone="quiet">No price is agreed yet.</Text> : null}
      <View style={css('w-rows')}>
        {prices.fields.map((field, at) => (
          <View key={field.id} role="group" aria-label={`Price ${at + 1}`} style={css('w-stack')}>
            <View style={css('w-fields')}>
              <FormSelect
                control={control}
                name={`prices.${at}.product`}
                label="Product"
                placeholder="Choose one"
                options={products}
              />
              <FormNumber control={control} name={`prices.${at}.tenthPencePerKg`} unit="poundsPerKg" label="Price" />
              <FormSelect control={control} name={`prices.${at}.basis`} label="Charged by" options={bases} />
            </View>
            <View style={css('w-row')}>
              <Button
                kind="quiet"
                small
                label="Take out"
                name={`Take out price ${at + 1}`}
                onPress={() => prices.remove(at)}
              />
            </View>
          </View>
        ))}
      </View>
      <View style={css('w-buttons')}>
        <Button label="Save the prices" busy={busy} onPress={onSubmit} />
        <Button
          kind="quiet"
          label="Add a price"
          icon="plus"
          onPress={() => prices.append({ product: '', tenthPencePerKg: 10_000, basis: 'scale weight' })}
        />
      </View>
    </FormFrame>
  );
}
