import { router, useLocalSearchParams } from 'expo-router';
import { useState } from 'react';
import { View } from 'react-native';
import { EditionTable } from '#components/specifications/edition-tables.tsx';
import { RetireAndRestore } from '#components/specifications/retire-and-restore.tsx';
import { SpecificationEditor } from '#components/specifications/specification-editor.tsx';
import { originWords } from '#components/specifications/specification-words.ts';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { Text } from '#components/ui/text.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import {
  useRestoreSpecification,
  useRetireSpecification,
  useSaveSpecification,
  useSpecification,
  useSpecifications,
} from '#hooks/specifications.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { getSpecificationSchema } from '#shared/contracts/specifications-schema.ts';
import type { Answer } from '#shared/contracts/endpoint.ts';
import { listSpecificationFaults } from '#shared/engine/figures/check-specification.ts';
import type { Specification } from '#shared/engine/figures/specification.ts';

type Edition = Answer<typeof getSpecificationSchema>;

const openEdition = (id: string) => router.replace(`/office/specifications/${id}?saved=1`);

export default function SpecificationScreen() {
  const { specificationId, saved } = useLocalSearchParams<{ specificationId: string; saved?: string }>();
  const specification = useSpecification(specificationId);
  return (
    <StateView
      query={specification}
      what="this specification"
      waiting={<Skeleton shape="rows" count={6} />}
      missing={{ title: 'No such specification', words: 'Look for it in the list of specifications.' }}
    >
      {(data) => (
        <View style={css('w-stack-l')}>
          <Head edition={data} />
          {saved ? (
            <Notice
              kind="good"
              spoken
              title={`Edition ${data.edition} is saved.`}
              kept="Cutting days that were planned before keep their edition."
            />
          ) : null}
          <Draft key={data.id} edition={data} />
          <Editions edition={data} />
        </View>
      )}
    </StateView>
  );
}

function Head({ edition }: { edition: Edition }) {
  useTitle(edition.name);
  return (
    <View>
      <TitleBar
        back={{ href: '/office/specifications', label: 'Specifications' }}
        title={edition.name}
        above={`Edition ${edition.edition} of ${edition.latestEdition}, ${originWords(edition)}${edition.isRetired ? ' · retired' : ''}`}
        lead={edition.body.source}
      />
      <TextLink href={`/office/specifications/${edition.id}/learning`} place="alone" icon="forward">
        What your own weights propose
      </TextLink>
    </View>
  );
}

function Draft({ edition }: { edition: Edition }) {
  const save = useSaveSpecification();
  const [draft, setDraft] = useState<Specification>(edition.body);
  const [isHeldBack, setHeldBack] = useState(false);
  const faults = listSpecificationFaults(draft);
  const isNewest = edition.edition === edition.latestEdition;
  const isReadOnly = !isNewest || edition.isRetired;
  const send = () => {
    setHeldBack(faults.length > 0);
    if (faults.length > 0) return;
    const body = { name: edition.name, basedOnEdition: edition.edition, body: draft };
    save.mutate(body, { onSuccess: ({ id }) => openEdition(id) });
  };
  return (
    <View style={css('w-stack')}>
      {isNewest ? null : (
        <Notice kind="info" title={`This is edition ${edition.edition}: it stays as it is.`}>
          <TextLink
            href={`/office/specifications/${edition.latestId}`}
          >{`Edit edition ${edition.latestEdition}`}</TextLink>
        </Notice>
      )}
      <SpecificationEditor draft={draft} faults={faults} isReadOnly={isReadOnly} onEdit={setDraft} />
      {isHeldBack && faults.length > 0 ? (
        <Notice
          kind="error"
          title="Nothing was saved: not everything adds up to 100 %."
          next="Put right what is named above."
        />
      ) : null}
      <ProblemNotice
        error={save.error}
        title="Nothing was saved."
        onShowNewest={() => router.push(`/office/specifications/${edition.latestId}`)}
      />
      {isReadOnly ? null : (
        <View style={css('w-buttons')}>
          <Button label={`Save as edition ${edition.edition + 1}`} busy={save.isPending} onPress={send} />
          {draft === edition.body ? null : (
            <Button kind="quiet" label="Undo all changes" onPress={() => setDraft(edition.body)} />
          )}
        </View>
      )}
    </View>
  );
}

function Editions({ edition }: { edition: Edition }) {
  const all = useSpecifications();
  const retire = useRetireSpecification();
  const restore = useRestoreSpecification();
  const params = { specificationId: edition.id };
  return (
    <View style={css('w-stack')}>
      <Heading level={2}>Editions</Heading>
      <StateView query={all} what="the editions">
        {({ specifications }) => (
          <EditionTable editions={specifications.filter(({ name }) => name === edition.name)} openId={edition.id} />
        )}
      </StateView>
      <RetireAndRestore
        isRetired={edition.isRetired}
        canRestore={edition.shippedId !== null && !edition.isRetired}
        busy={retire.isPending || restore.isPending}
        onRetire={(isRetired) => retire.mutate({ params, body: { isRetired } })}
        onRestore={() =>
          restore.mutate(
            { params, body: { basedOnEdition: edition.latestEdition } },
            { onSuccess: ({ id }) => openEdition(id) },
          )
        }
      />
      <ProblemNotice error={retire.error ?? restore.error} title="Nothing was changed." />
      <Text size="small" tone="quiet" measure>
        Shares are parts of cold weight after hanging, for the class {edition.body.reference.conformation}
        {edition.body.reference.fatClass}. A carcase of another class is reckoned from them by the published slopes.
      </Text>
    </View>
  );
}
