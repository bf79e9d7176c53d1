import { View } from 'react-native';
import { useFieldArray, type Control } from 'react-hook-form';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { FormDay } from '#components/ui/form-day.tsx';
import { FormFrame } from '#components/ui/form-frame.tsx';
import { FormSelect } from '#components/ui/form-select.tsx';
import { FormText } from '#components/ui/form-text.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { Text } from '#components/ui/text.tsx';
import type { NewCuttingDay } from '#shared/contracts/carcases.ts';
import { CollectionFields } from './collection-fields.tsx';

type Named = { id: string; name: string };

type NewDayFormProps = {
  control: Control<NewCuttingDay>;
  specifications: readonly (Named & { edition: number })[];
  points: readonly Named[];
  onSubmit: () => void;
  busy: boolean;
};

/** When it is cut, until when orders are taken, and where and when people collect. */
export function NewDayForm({ control, specifications, points, onSubmit, busy }: NewDayFormProps) {
  const collections = useFieldArray({ control, name: 'collections' });
  const addCollection = () =>
    collections.append({
      pointId: points[0]?.id ?? '',
      day: '',
      from: '15:00',
      to: '18:00',
      slotMinutes: 30,
      capacity: 6,
    });
  return (
    <FormFrame name="Cutting day" onSubmit={onSubmit}>
      <View style={css('w-fields')}>
        <FormDay control={control} name="day" label="Cutting day" />
        <FormSelect
          control={control}
          name="specificationId"
          label="Cutting specification"
          placeholder="Choose one"
          options={specifications.map(({ id, name, edition }) => ({ value: id, label: `${name}, edition ${edition}` }))}
        />
      </View>
      <View style={css('w-fields')}>
        <FormDay control={control} name="cutOffDay" label="Orders until" hint="The last day for orders." />
        <FormText control={control} name="cutOffTime" label="Until when" hint="As 18:00." width="short" />
      </View>
      <Heading level={2}>Collections</Heading>
      {collections.fields.length === 0 ? (
        <Text tone="quiet">None yet. Without a collection nobody can order a box for this day.</Text>
      ) : null}
      <View style={css('w-rows')}>
        {collections.fields.map((field, at) => (
          <CollectionFields
            key={field.id}
            control={control}
            at={at}
            points={points}
            onRemove={() => collections.remove(at)}
          />
        ))}
      </View>
      <View style={css('w-buttons')}>
        <Button kind="quiet" label="Add a collection" icon="plus" onPress={addCollection} />
        <Button label="Plan this day" busy={busy} onPress={onSubmit} />
      </View>
    </FormFrame>
  );
}
