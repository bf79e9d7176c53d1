import { router } from 'expo-router';
import { View } from 'react-native';
import { CopyForm } from '#components/specifications/copy-form.tsx';
import { SpecificationTable } from '#components/specifications/edition-tables.tsx';
import { css } from '#components/theme/css.ts';
import { Disclosure } from '#components/ui/disclosure.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { Text } from '#components/ui/text.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useCopySpecification, useSpecifications } from '#hooks/specifications.ts';
import { sendForm, useContractForm } from '#hooks/use-contract-form.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { SpecificationCopy, SpecificationEdition } from '#shared/contracts/specifications.ts';
import { newestEditions } from '#shared/domain/specification-editions.ts';

const loadSchema = async () => (await import('#hooks/form-schemas.ts')).specifications.SpecificationCopy;

type Shipped = { id: string; name: string; source: string };

export default function SpecificationsScreen() {
  const specifications = useSpecifications();
  useTitle('Specifications');
  return (
    <StateView query={specifications} what="the cutting specifications" waiting={<Skeleton shape="rows" count={3} />}>
      {({ specifications: editions, shipped }) => (
        <View style={css('w-stack-l')}>
          <TitleBar
            title="Specifications"
            lead="How a side is cut, in shares. A cutting day keeps the edition that it was planned with."
          />
          <SpecificationTable editions={editions} />
          <View style={css('w-stack')}>
            <Heading level={2}>Make one of your own</Heading>
            <Copy editions={editions} shipped={shipped} />
            <Disclosure words="What comes with the program" ruled>
              {shipped.map(({ id, name, source }) => (
                <Text key={id} measure>{`${name}. ${source}`}</Text>
              ))}
            </Disclosure>
          </View>
        </View>
      )}
    </StateView>
  );
}

function Copy({ editions, shipped }: { editions: readonly SpecificationEdition[]; shipped: readonly Shipped[] }) {
  const copy = useCopySpecification();
  const form = useContractForm<SpecificationCopy>(loadSchema, { name: '', fromId: '' });
  const submit = sendForm(form, async (body) => {
    const made = await copy.mutateAsync(body);
    router.push(`/office/specifications/${made.id}`);
  });
  const sources = [
    ...shipped.map(({ id, name }) => ({ id, label: `${name}, as it came` })),
    ...newestEditions(editions).map(({ id, name, edition }) => ({ id, label: `${name}, edition ${edition}` })),
  ];
  return (
    <View style={css('w-stack')}>
      <CopyForm control={form.control} sources={sources} onSubmit={submit} busy={copy.isPending} />
      <ProblemNotice error={copy.error} title="The specification was not made." />
    </View>
  );
}
