import { View } from 'react-native';
import type { Control } from 'react-hook-form';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { FormDay } from '#components/ui/form-day.tsx';
import { FormNumber } from '#components/ui/form-number.tsx';
import { FormSelect } from '#components/ui/form-select.tsx';
import { FormText } from '#components/ui/form-text.tsx';
import type { NewCuttingDay } from '#shared/contracts/carcases.ts';

type CollectionFieldsProps = {
  control: Control<NewCuttingDay>;
  at: number;
  points: readonly { id: string; name: string }[];
  onRemove: () => void;
};

/** One stretch of hours at one collection point, divided into slots. */
export function CollectionFields({ control, at, points, onRemove }: CollectionFieldsProps) {
  return (
    <View role="group" aria-label={`Collection ${at + 1}`} style={css('w-stack')}>
      <View style={css('w-fields')}>
        <FormSelect
          control={control}
          name={`collections.${at}.pointId`}
          label="Collection point"
          options={points.map(({ id, name }) => ({ value: id, label: name }))}
        />
        <FormDay control={control} name={`collections.${at}.day`} label="Collection day" />
      </View>
      <View style={css('w-fields')}>
        <FormText control={control} name={`collections.${at}.from`} label="From" width="short" />
        <FormText control={control} name={`collections.${at}.to`} label="To" width="short" />
        <FormNumber
          control={control}
          name={`collections.${at}.slotMinutes`}
          unit="count"
          label="A slot lasts"
          after="minutes"
        />
        <FormNumber control={control} name={`collections.${at}.capacity`} unit="count" label="Orders a slot" />
      </View>
      <View style={css('w-row')}>
        <Button kind="quiet" small label="Take out" name={`Take out collection ${at + 1}`} onPress={onRemove} />
      </View>
    </View>
  );
}
