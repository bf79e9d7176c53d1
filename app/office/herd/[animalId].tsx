import { useLocalSearchParams } from 'expo-router';
import { useState } from 'react';
import { View } from 'react-native';
import { AnimalForm } from '#components/herd/animal-form.tsx';
import { describeAnimal } from '#components/herd/animal-state.ts';
import { MedicineForm, MedicineTable, type MedicineEntry } from '#components/herd/medicine-book.tsx';
import { css } from '#components/theme/css.ts';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useAnimals, useEditAnimal, useRecordMedicine } from '#hooks/herd.ts';
import { useToday } from '#hooks/office.ts';
import { sendForm, useContractForm } from '#hooks/use-contract-form.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { Animal, NewAnimal } from '#shared/contracts/herd.ts';
import { formatEarTag } from '#shared/domain/ear-tag.ts';
import { formatCount } from '#shared/domain/words.ts';

const loadSchema = async () => (await import('#hooks/form-schemas.ts')).herd.NewAnimal;
const loadMedicineSchema = async () => (await import('#hooks/form-schemas.ts')).herd.recordMedicineSchema.body;

export default function AnimalScreen() {
  const { animalId } = useLocalSearchParams<{ animalId: string }>();
  const animals = useAnimals();
  const today = useToday();
  // Counts up to draw the forms afresh, with the record as it is now.
  const [round, setRound] = useState(0);
  return (
    <StateView query={animals} what="this animal">
      {(data) => {
        const animal = data.animals.find(({ id }) => id === animalId);
        if (!animal) {
          return <EmptyState level={1} title="No such animal" words="It is not, or no longer, in the herd." />;
        }
        const afresh = () => setRound(round + 1);
        return (
          <View style={css('w-stack-l')} key={`${animal.id} ${round}`}>
            <TitleBar
              back={{ href: '/office/herd', label: 'Herd' }}
              title={formatEarTag(animal.earTag)}
              above={[animal.breed, animal.sex, formatCount(animal.ageMonths, 'month')].join(' · ')}
              lead={describeAnimal(animal, today.data?.today).words}
            />
            <View style={css('w-columns')}>
              <Record animal={animal} afresh={afresh} isSaved={round > 0} />
              <Medicines animal={animal} afresh={afresh} />
            </View>
          </View>
        );
      }}
    </StateView>
  );
}

type PartProps = { animal: Animal; afresh: () => void };

function Record({ animal, afresh, isSaved }: PartProps & { isSaved: boolean }) {
  const edit = useEditAnimal();
  const { earTag, breed, sex, born, damEarTag, liveGrams } = animal;
  // The edition that was on the screen when typing began: a newer one is not overwritten.
  const [version] = useState(animal.version);
  const form = useContractForm<NewAnimal>(loadSchema, { earTag, breed, sex, born, damEarTag, liveGrams });
  useTitle(formatEarTag(earTag));
  const submit = sendForm(form, async (body) => {
    await edit.mutateAsync({ params: { animalId: animal.id }, body: { ...body, version } });
    afresh();
  });
  return (
    <View style={css('w-stack')}>
      <Heading level={2}>Record</Heading>
      {isSaved ? <Notice kind="good" spoken title="This is what is recorded now." /> : null}
      <AnimalForm control={form.control} onSubmit={submit} busy={edit.isPending} submitLabel="Save" />
      <ProblemNotice error={edit.error} title="The record was not saved." onShowNewest={afresh} />
    </View>
  );
}

function Medicines({ animal, afresh }: PartProps) {
  const record = useRecordMedicine();
  const form = useContractForm<MedicineEntry>(loadMedicineSchema, { product: '', givenOn: '', withdrawalDays: 0 });
  const submit = sendForm(form, async (body) => {
    await record.mutateAsync({ params: { animalId: animal.id }, body });
    afresh();
  });
  return (
    <View style={css('w-stack')}>
      <Heading level={2}>Medicine book</Heading>
      <MedicineTable medicines={animal.medicines} />
      <MedicineForm control={form.control} onSubmit={submit} busy={record.isPending} />
      <ProblemNotice error={record.error} title="The medicine was not recorded." />
    </View>
  );
}
