import { View } from 'react-native';
import type { UseFormReturn } from 'react-hook-form';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { Disclosure } from '#components/ui/disclosure.tsx';
import { FormDay } from '#components/ui/form-day.tsx';
import { FormFrame } from '#components/ui/form-frame.tsx';
import { FormNumber } from '#components/ui/form-number.tsx';
import { FormText } from '#components/ui/form-text.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { Text } from '#components/ui/text.tsx';
import type { PriceGridEdit } from '#shared/contracts/margin.ts';
import { britishGrid, irishQualityGrid } from '#shared/engine/figures/price-grids.ts';
import { GridClasses } from './grid-classes.tsx';
import { GridSteps } from './grid-steps.tsx';
import { takeOver } from './margin-words.ts';

type PriceGridFormProps = {
  form: UseFormReturn<PriceGridEdit, unknown, PriceGridEdit>;
  onSubmit: () => void;
  busy: boolean;
};

/** What a buyer would pay for the carcase itself: base, classes, weight, age, and what he takes off. */
export function PriceGridForm({ form, onSubmit, busy }: PriceGridFormProps) {
  const { control } = form;
  return (
    <FormFrame name="Price grid" onSubmit={onSubmit}>
      <View style={css('w-fields')}>
        <FormText control={control} name="name" label="Name" />
        <FormText control={control} name="source" label="Source" hint="Whose prices these are, and of which week." />
        <FormDay
          control={control}
          name="validFrom"
          label="In force from"
          hint="Carcases are priced by their day of kill."
        />
      </View>
      <Heading level={2}>Per head and per kilogram</Heading>
      <View style={css('w-fields')}>
        <FormNumber
          control={control}
          name="baseTenthPencePerKg"
          unit="poundsPerKg"
          label="Base price"
          hint="The headline class, per kilogram of cold weight."
        />
        <FormNumber control={control} name="levyPence" unit="pounds" label="Levy" hint="Taken off per head." />
        <FormNumber control={control} name="haulagePence" unit="pounds" label="Haulage" hint="Taken off per head." />
        <FormNumber
          control={control}
          name="deductionsPence"
          unit="pounds"
          label="Other deductions"
          hint="Classification, insurance and the like, per head."
        />
      </View>
      <Heading level={2}>Classes</Heading>
      <GridClasses control={control} setValue={form.setValue} />
      <GridSteps control={control} />
      <Disclosure words="Begin from a published grid" ruled>
        <View style={css('w-stack')}>
          <Text measure>
            Replaces name, source, classes and steps by published ones; base and deductions stay. Nothing is saved until
            you save.
          </Text>
          <View style={css('w-row')}>
            {[britishGrid, irishQualityGrid].map((grid) => (
              <Button
                key={grid.name}
                kind="quiet"
                small
                label={grid.name}
                onPress={() => form.reset({ ...form.getValues(), ...takeOver(grid) })}
              />
            ))}
          </View>
        </View>
      </Disclosure>
      <View style={css('w-buttons')}>
        <Button label="Save the price grid" busy={busy} onPress={onSubmit} />
      </View>
    </FormFrame>
  );
}
