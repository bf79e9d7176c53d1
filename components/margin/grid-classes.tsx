import { useState } from 'react';
import { View } from 'react-native';
import type { Control, UseFormSetValue } from 'react-hook-form';
import { useWatch } from 'react-hook-form';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { Disclosure } from '#components/ui/disclosure.tsx';
import { Field } from '#components/ui/field.tsx';
import { FormNumber } from '#components/ui/form-number.tsx';
import { Select } from '#components/ui/select.tsx';
import type { PriceGridEdit } from '#shared/contracts/margin.ts';
import { addConformation, addFatClass, spanOfRow } from './margin-words.ts';

type GridClassesProps = { control: Control<PriceGridEdit>; setValue: UseFormSetValue<PriceGridEdit> };

/** The adjustments of every class: a fold for each fat class, a field for each conformation. */
export function GridClasses({ control, setValue }: GridClassesProps) {
  const [conformations, rows] = useWatch({ control, name: ['conformations', 'rows'] });
  return (
    <View style={css('w-stack')}>
      {rows.map((row, at) => (
        <Disclosure
          key={row.fatClass}
          ruled
          words={`Fat class ${row.fatClass}: ${spanOfRow(row.adjustments)} a kilogram`}
        >
          <View role="group" aria-label={`Fat class ${row.fatClass}`} style={css('w-fields')}>
            {conformations.map((conformation, column) => (
              <FormNumber
                key={conformation}
                control={control}
                name={`rows.${at}.adjustments.${column}`}
                unit="poundsPerKg"
                label={`${conformation} ${row.fatClass}`}
              />
            ))}
          </View>
        </Disclosure>
      ))}
      <AddClass
        onAdd={(kind, name) => {
          const more = kind === 'conformation' ? addConformation : addFatClass;
          const next = more({ conformations, rows }, name);
          setValue('conformations', next.conformations);
          setValue('rows', next.rows);
        }}
        known={[...conformations, ...rows.map(({ fatClass }) => fatClass)]}
      />
    </View>
  );
}

type Kind = 'conformation' | 'fat';
type AddClassProps = { onAdd: (kind: Kind, name: string) => void; known: readonly string[] };

/** A class that the buyer pays for and the grid lacks yet; it begins at the price of its neighbour. */
function AddClass({ onAdd, known }: AddClassProps) {
  const [kind, setKind] = useState<Kind>('conformation');
  const [name, setName] = useState('');
  const wanted = name.trim();
  return (
    <Disclosure words="Add a class" ruled>
      <View style={css('w-fields')}>
        <Select
          label="Kind of class"
          value={kind}
          options={[
            { value: 'conformation', label: 'Conformation' },
            { value: 'fat', label: 'Fat class' },
          ]}
          onChange={(value) => setKind(value === 'fat' ? 'fat' : 'conformation')}
        />
        <Field
          label="Class"
          hint="As the kill sheet prints it, such as S or 4."
          value={name}
          onChangeText={setName}
          maxLength={3}
          width="short"
        />
      </View>
      <View style={css('w-row')}>
        <Button
          kind="quiet"
          small
          icon="plus"
          label="Add this class"
          disabled={wanted === '' || known.includes(wanted)}
          onPress={() => {
            onAdd(kind, wanted);
            setName('');
          }}
        />
      </View>
    </Disclosure>
  );
}
