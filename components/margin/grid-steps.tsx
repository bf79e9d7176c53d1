import { View } from 'react-native';
import { useFieldArray, type Control } from 'react-hook-form';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { FormNumber } from '#components/ui/form-number.tsx';
import { Heading } from '#components/ui/heading.tsx';
import type { PriceGridEdit } from '#shared/contracts/margin.ts';

/** What heavy and old carcases are paid on or off the base. */
export function GridSteps({ control }: { control: Control<PriceGridEdit> }) {
  const weights = useFieldArray({ control, name: 'weightSteps' });
  const ages = useFieldArray({ control, name: 'ageSteps' });
  return (
    <View style={css('w-columns')}>
      <View style={css('w-stack')}>
        <Heading level={3}>By weight</Heading>
        {weights.fields.map((field, at) => (
          <View key={field.id} role="group" aria-label={`Weight step ${at + 1}`} style={css('w-fields')}>
            <FormNumber control={control} name={`weightSteps.${at}.fromGrams`} unit="kilograms" label="From" />
            <FormNumber
              control={control}
              name={`weightSteps.${at}.adjustment`}
              unit="poundsPerKg"
              label="On or off the base"
            />
            <Button
              kind="quiet"
              small
              label="Take out"
              name={`Take out weight step ${at + 1}`}
              onPress={() => weights.remove(at)}
            />
          </View>
        ))}
        <View style={css('w-row')}>
          <Button
            kind="quiet"
            small
            icon="plus"
            label="Add a weight step"
            onPress={() => weights.append({ fromGrams: 420_000, adjustment: 0 })}
          />
        </View>
      </View>
      <View style={css('w-stack')}>
        <Heading level={3}>By age</Heading>
        {ages.fields.map((field, at) => (
          <View key={field.id} role="group" aria-label={`Age step ${at + 1}`} style={css('w-fields')}>
            <FormNumber
              control={control}
              name={`ageSteps.${at}.overMonths`}
              unit="count"
              label="Older than"
              after="months"
            />
            <FormNumber
              control={control}
              name={`ageSteps.${at}.adjustment`}
              unit="poundsPerKg"
              label="On or off the base"
            />
            <Button
              kind="quiet"
              small
              label="Take out"
              name={`Take out age step ${at + 1}`}
              onPress={() => ages.remove(at)}
            />
          </View>
        ))}
        <View style={css('w-row')}>
          <Button
            kind="quiet"
            small
            icon="plus"
            label="Add an age step"
            onPress={() => ages.append({ overMonths: 30, adjustment: 0 })}
          />
        </View>
      </View>
    </View>
  );
}
