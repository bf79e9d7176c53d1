import { router } from 'expo-router';
import { View } from 'react-native';
import { NewDayForm } from '#components/carcases/new-day-form.tsx';
import { css } from '#components/theme/css.ts';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useAddCuttingDay, useCollectionPoints } from '#hooks/carcases.ts';
import { useSpecifications } from '#hooks/specifications.ts';
import { sendForm, useContractForm } from '#hooks/use-contract-form.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { NewCuttingDay } from '#shared/contracts/carcases.ts';
import { editionsOnOffer } from '#shared/domain/specification-editions.ts';

const loadSchema = async () => (await import('#hooks/form-schemas.ts')).carcases.NewCuttingDay;

export default function NewCuttingDayScreen() {
  const specifications = useSpecifications();
  const points = useCollectionPoints();
  const add = useAddCuttingDay();
  const form = useContractForm<NewCuttingDay>(loadSchema, {
    day: '',
    cutOffDay: '',
    cutOffTime: '18:00',
    specificationId: '',
    collections: [],
  });
  useTitle('Plan a cutting day');
  const submit = sendForm(form, async (body) => {
    const day = await add.mutateAsync(body);
    router.push(`/office/cutting-days/${day.id}`);
  });
  return (
    <View style={css('w-stack-l')}>
      <TitleBar back={{ href: '/office/cutting-days', label: 'Cutting days' }} title="Plan a cutting day" />
      <StateView query={specifications} what="the cutting specifications">
        {({ specifications: list }) => (
          <StateView query={points} what="the collection points">
            {({ points: places }) => (
              <NewDayForm
                control={form.control}
                specifications={editionsOnOffer(list)}
                points={places}
                onSubmit={submit}
                busy={add.isPending}
              />
            )}
          </StateView>
        )}
      </StateView>
      <ProblemNotice error={add.error} title="The day was not planned." />
    </View>
  );
}
