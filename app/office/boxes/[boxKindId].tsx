import { useLocalSearchParams } from 'expo-router';
import { useState } from 'react';
import { View } from 'react-native';
import { BoxKindForm } from '#components/office/box-kind-form.tsx';
import { BoxSwaps } from '#components/office/box-swaps.tsx';
import { css } from '#components/theme/css.ts';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useAddSwap, useBoxKinds, useEditBoxKind } from '#hooks/office.ts';
import { sendForm, useContractForm } from '#hooks/use-contract-form.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { BoxKind, BoxKindEdit, Cut } from '#shared/contracts/office.ts';
import { formatWeight } from '#shared/domain/words.ts';

const loadSchema = async () => (await import('#hooks/form-schemas.ts')).office.BoxKindEdit;

export default function BoxKindScreen() {
  const { boxKindId } = useLocalSearchParams<{ boxKindId: string }>();
  const boxKinds = useBoxKinds();
  // Counts up to draw the form afresh, with the box as it is now.
  const [round, setRound] = useState(0);
  return (
    <StateView query={boxKinds} what="this box">
      {(data) => {
        const box = data.boxKinds.find(({ id }) => id === boxKindId);
        if (!box) return <EmptyState level={1} title="No such box" words="Look for it in the list of boxes." />;
        return (
          <View style={css('w-stack-l')}>
            <View>
              <TitleBar
                back={{ href: '/office/boxes', label: 'Boxes' }}
                title={box.name}
                above={`Box of ${formatWeight(box.guaranteedGrams)}`}
              />
              <TextLink href={`/office/photographs/${box.id}`} place="alone" icon="forward">
                Photographs
              </TextLink>
            </View>
            <Swaps box={box} kinds={data.boxKinds} />
            {round > 0 ? <Notice kind="good" spoken title="This is what is recorded now." /> : null}
            <Edit key={`${box.id} ${round}`} box={box} cuts={data.cuts} afresh={() => setRound(round + 1)} />
          </View>
        );
      }}
    </StateView>
  );
}

/** Its swaps, or the box that this is a swap of. */
function Swaps({ box, kinds }: { box: BoxKind; kinds: readonly BoxKind[] }) {
  const add = useAddSwap();
  const swapOf = kinds.find(({ id }) => id === box.swapOfId);
  return (
    <BoxSwaps
      swapOf={swapOf}
      swaps={kinds.filter((kind) => kind.swapOfId === box.id)}
      onAdd={(name) => add.mutate({ params: { boxKindId: box.id }, body: { name } })}
      isAdding={add.isPending}
      error={add.error}
    />
  );
}

function Edit({ box, cuts, afresh }: { box: BoxKind; cuts: readonly Cut[]; afresh: () => void }) {
  const edit = useEditBoxKind();
  const { id, slug: _slug, swapOfId: _swapOfId, ...values } = box;
  const form = useContractForm<BoxKindEdit>(loadSchema, values);
  useTitle(box.name);
  const submit = sendForm(form, async (body) => {
    await edit.mutateAsync({ params: { boxKindId: id }, body });
    afresh();
  });
  return (
    <View style={css('w-stack')}>
      <BoxKindForm control={form.control} cuts={cuts} onSubmit={submit} busy={edit.isPending} />
      <ProblemNotice error={edit.error} title="The box was not saved." onShowNewest={afresh} />
    </View>
  );
}
