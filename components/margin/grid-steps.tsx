import type { ReactNode } from 'react';
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
      <Steps
        kind="weight"
        ids={weights.fields.map(({ id }) => id)}
        onAdd={() => weights.append({ fromGrams: 420_000, adjustment: 0 })}
        onRemove={weights.remove}
        fieldsAt={(at) => (
          <>
            <FormNumber control={control} name={`weightSteps.${at}.fromGrams`} unit="kilograms" label="From" />
            <FormNumber control={control} name={`weightSteps.${at}.adjustment`} unit="poundsPerKg" label={ON_OR_OFF} />
          </>
        )}
      />
      <Steps
        kind="age"
        ids={ages.fields.map(({ id }) => id)}
        onAdd={() => ages.append({ overMonths: 30, adjustment: 0 })}
        onRemove={ages.remove}
        fieldsAt={(at) => (
          <>
            <FormNumber
              control={control}
              name={`ageSteps.${at}.overMonths`}
              unit="count"
              label="Older than"
              after="months"
            />
            <FormNumber control={control} name={`ageSteps.${at}.adjustment`} unit="poundsPerKg" label={ON_OR_OFF} />
          </>
        )}
      />
    </View>
  );
}

const ON_OR_OFF = 'On or off the base';

type StepsProps = {
  kind: 'weight' | 'age';
  ids: readonly string[];
  fieldsAt: (at: number) => ReactNode;
  onAdd: () => void;
  onRemove: (at: number) => void;
};

function Steps({ kind, ids, fieldsAt, onAdd, onRemove }: StepsProps) {
  const [name, article] = kind === 'weight' ? ['Weight', 'a'] : ['Age', 'an'];
  return (
    <View style={css('w-stack')}>
      <Heading level={3}>{`By ${kind}`}</Heading>
      {ids.map((id, at) => (
        <View key={id} role="group" aria-label={`${name} step ${at + 1}`} style={css('w-fields')}>
          {fieldsAt(at)}
          <Button
            kind="quiet"
            small
            label="Take out"
            name={`Take out ${kind} step ${at + 1}`}
            onPress={() => onRemove(at)}
          />
        </View>
      ))}
      <View style={css('w-row')}>
        <Button kind="quiet" small icon="plus" label={`Add ${article} ${kind} step`} onPress={onAdd} />
      </View>
    </View>
  );
}
