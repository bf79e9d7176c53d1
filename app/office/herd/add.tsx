import { router } from 'expo-router';
import { View } from 'react-native';
import { AnimalForm } from '#components/herd/animal-form.tsx';
import { css } from '#components/theme/css.ts';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useAddAnimal } from '#hooks/herd.ts';
import { sendForm, useContractForm } from '#hooks/use-contract-form.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { NewAnimal } from '#shared/contracts/herd.ts';

const loadSchema = async () => (await import('#hooks/form-schemas.ts')).herd.NewAnimal;

export default function AddAnimalScreen() {
  const add = useAddAnimal();
  const form = useContractForm<NewAnimal>(loadSchema, {
    earTag: 'UK ',
    breed: '',
    sex: 'steer',
    born: '',
    damEarTag: null,
    liveGrams: null,
  });
  useTitle('Add an animal');
  const submit = sendForm(form, async (animal) => {
    await add.mutateAsync(animal);
    router.push('/office/herd');
  });
  return (
    <View style={css('w-stack-l')}>
      <TitleBar back={{ href: '/office/herd', label: 'Herd' }} title="Add an animal" />
      <View style={css('w-stack', 't-measure')}>
        <AnimalForm control={form.control} onSubmit={submit} busy={add.isPending} submitLabel="Add to the herd" />
        <ProblemNotice error={add.error} title="The animal was not added." />
      </View>
    </View>
  );
}
