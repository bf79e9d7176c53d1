import { View } from 'react-native';
import type { Control } from 'react-hook-form';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { FormDay } from '#components/ui/form-day.tsx';
import { FormFrame } from '#components/ui/form-frame.tsx';
import { FormNumber } from '#components/ui/form-number.tsx';
import { FormText } from '#components/ui/form-text.tsx';
import { Table } from '#components/ui/table.tsx';
import type { Animal } from '#shared/contracts/herd.ts';
import { addDays } from '#shared/domain/day.ts';
import { formatCount, formatDayWithYear } from '#shared/domain/words.ts';

export type MedicineEntry = { product: string; givenOn: string; withdrawalDays: number };

type Medicine = Animal['medicines'][number];

/** What the animal was given. A kill day inside a withdrawal period is refused. */
export function MedicineTable({ medicines }: { medicines: readonly Medicine[] }) {
  return (
    <Table<Medicine>
      caption="Medicines given"
      rows={medicines}
      rowKey={(medicine) => medicine.id}
      empty="No medicine is recorded."
      columns={[
        { id: 'product', title: 'Product', cell: (medicine) => medicine.product },
        { id: 'given', title: 'Given on', cell: (medicine) => formatDayWithYear(medicine.givenOn) },
        {
          id: 'days',
          title: 'Withdrawal',
          align: 'end',
          cell: (medicine) => formatCount(medicine.withdrawalDays, 'day'),
        },
        {
          id: 'clear',
          title: 'Over on',
          align: 'end',
          cell: (medicine) => formatDayWithYear(addDays(medicine.givenOn, medicine.withdrawalDays)),
        },
      ]}
    />
  );
}

type MedicineFormProps = { control: Control<MedicineEntry>; onSubmit: () => void; busy: boolean };

export function MedicineForm({ control, onSubmit, busy }: MedicineFormProps) {
  return (
    <FormFrame name="Medicine" onSubmit={onSubmit}>
      <View style={css('w-fields')}>
        <FormText control={control} name="product" label="Product" />
        <FormDay control={control} name="givenOn" label="Given on" />
        <FormNumber
          control={control}
          name="withdrawalDays"
          unit="count"
          label="Withdrawal for meat"
          after="days"
          hint="As the product's label or your vet states it."
        />
      </View>
      <View style={css('w-buttons')}>
        <Button kind="quiet" label="Record medicine" busy={busy} onPress={onSubmit} />
      </View>
    </FormFrame>
  );
}
