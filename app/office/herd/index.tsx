import { useState } from 'react';
import { View } from 'react-native';
import { AnimalTable } from '#components/herd/animal-table.tsx';
import { findAnimals } from '#components/herd/animal-state.ts';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { Checkbox } from '#components/ui/checkbox.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { Field } from '#components/ui/field.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useAnimals } from '#hooks/herd.ts';
import { useToday } from '#hooks/office.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { Animal } from '#shared/contracts/herd.ts';
import { formatCount } from '#shared/domain/words.ts';

/** More rows than this are shown when asked for. */
const FIRST_ROWS = 40;

export default function HerdScreen() {
  const animals = useAnimals();
  useTitle('Herd');
  return (
    <StateView query={animals} what="the herd" waiting={<Skeleton shape="rows" count={8} />}>
      {(data) => (
        <View style={css('w-stack-l')}>
          <TitleBar
            title="Herd"
            above={`${formatCount(data.animals.length, 'animal')} on the books`}
            actions={<ButtonLink href="/office/herd/add" label="Add an animal" icon="plus" />}
          />
          {data.animals.length === 0 ? (
            <EmptyState
              title="No animals yet"
              words="Add the first one with its ear tag; it can then be booked for a kill day."
            />
          ) : (
            <Herd animals={data.animals} />
          )}
        </View>
      )}
    </StateView>
  );
}

function Herd({ animals }: { animals: readonly Animal[] }) {
  const today = useToday();
  const [typed, setTyped] = useState('');
  const [isInFieldOnly, setInFieldOnly] = useState(false);
  const [isAll, setAll] = useState(false);
  const found = findAnimals(animals, typed).filter((animal) => !isInFieldOnly || !animal.carcase);
  const shown = isAll ? found : found.slice(0, FIRST_ROWS);
  return (
    <View style={css('w-stack')}>
      <View style={css('w-fields')}>
        <Field label="Find by tag or breed" value={typed} onChangeText={setTyped} required={false} />
        <Checkbox label="Only those in the field" checked={isInFieldOnly} onChange={setInFieldOnly} />
      </View>
      <AnimalTable animals={shown} today={today.data?.today} />
      {shown.length < found.length ? (
        <View style={css('w-buttons')}>
          <Button kind="quiet" label={`Show all ${found.length}`} onPress={() => setAll(true)} />
        </View>
      ) : null}
    </View>
  );
}
