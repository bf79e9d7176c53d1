import { useLocalSearchParams } from 'expo-router';
import { useState } from 'react';
import { View } from 'react-native';
import { AddPhotograph } from '#components/photographs/add-photograph.tsx';
import { PhotographImage } from '#components/photographs/box-photographs.tsx';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { Text } from '#components/ui/text.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useBoxKinds } from '#hooks/office.ts';
import { useAddPhotograph, useBoxPhotographs, useRemovePhotograph } from '#hooks/photographs.ts';
import { useTitle } from '#hooks/use-title.ts';

export default function PhotographsScreen() {
  const { boxKindId } = useLocalSearchParams<{ boxKindId: string }>();
  const boxKinds = useBoxKinds();
  const photographs = useBoxPhotographs(boxKindId);
  const add = useAddPhotograph(boxKindId);
  const remove = useRemovePhotograph();
  // Counts up to empty the form once its picture is kept.
  const [round, setRound] = useState(0);
  const box = boxKinds.data?.boxKinds.find(({ id }) => id === boxKindId);
  useTitle('Photographs');
  return (
    <View style={css('w-stack-l')}>
      <TitleBar
        back={{ href: `/office/boxes/${boxKindId}`, label: box?.name ?? 'The box' }}
        title="Photographs"
        above={box?.name}
      />
      <ProblemNotice error={add.error} title="The picture was not added." />
      <ProblemNotice error={remove.error} title="The picture was not taken away." />
      {add.isSuccess ? <Notice kind="good" spoken title="The picture stands on the box's page now." /> : null}
      <StateView query={photographs} what="the photographs">
        {(data) =>
          data.photographs.length === 0 ? (
            <EmptyState
              title="No photograph yet"
              words="Until there is one, the box's page shows drawings of its cuts."
            />
          ) : (
            <View role="list" style={css('w-tiles')}>
              {data.photographs.map((photograph) => (
                <View role="listitem" key={photograph.id} style={css('w-stack')}>
                  <PhotographImage photograph={photograph} />
                  <Text size="small">{photograph.alt}</Text>
                  <Button
                    kind="quiet"
                    small
                    label="Take it away"
                    name={`Take it away: ${photograph.alt}`}
                    busy={remove.isPending && remove.variables === photograph.id}
                    onPress={() => remove.mutate(photograph.id)}
                  />
                </View>
              ))}
            </View>
          )
        }
      </StateView>
      <View style={css('w-stack')}>
        <Heading level={2}>Add one</Heading>
        <AddPhotograph
          key={round}
          isSending={add.isPending}
          onAdd={(picture) => add.mutate(picture, { onSuccess: () => setRound(round + 1) })}
        />
      </View>
    </View>
  );
}
