import { useState } from 'react';
import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Badge } from '#components/ui/badge.tsx';
import { Button } from '#components/ui/button.tsx';
import { Field } from '#components/ui/field.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { Text } from '#components/ui/text.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import type { BoxKind } from '#shared/contracts/office.ts';

type BoxSwapsProps = {
  /** The box that this is a swap of, if it is one. */
  swapOf: BoxKind | undefined;
  swaps: readonly BoxKind[];
  onAdd: (name: string) => void;
  isAdding: boolean;
  error: Error | null;
};

/** What can be had instead of a box at its price: the list, and a new one by its name. */
export function BoxSwaps({ swapOf, swaps, onAdd, isAdding, error }: BoxSwapsProps) {
  const [name, setName] = useState('');
  if (swapOf) {
    return (
      <View style={css('w-stack-s')}>
        <Text>{`A swap of ${swapOf.name}: its price and its guaranteed weight are set there.`}</Text>
        <TextLink href={`/office/boxes/${swapOf.id}`} place="alone" icon="forward">
          {swapOf.name}
        </TextLink>
      </View>
    );
  }
  return (
    <View style={css('w-stack-s')}>
      <Heading level={2}>Swaps</Heading>
      <Text tone="quiet" measure>
        A swap is this box at this price with another recipe. A new one begins as a copy, not offered yet.
      </Text>
      <View role="list" style={css('w-rows')}>
        {swaps.map((swap) => (
          <View key={swap.id} role="listitem" style={css('w-row-between')}>
            <TextLink href={`/office/boxes/${swap.id}`}>{swap.name}</TextLink>
            <Badge kind={swap.isActive ? 'free' : 'quiet'}>{swap.isActive ? 'offered' : 'not offered'}</Badge>
          </View>
        ))}
      </View>
      <ProblemNotice error={error} title="The swap was not added." />
      <Field label="Name of a new swap" value={name} onChangeText={setName} onSubmitEditing={() => onAdd(name)} />
      <View style={css('w-buttons')}>
        <Button
          kind="quiet"
          label="Add the swap"
          busy={isAdding}
          disabled={name.trim() === ''}
          onPress={() => onAdd(name)}
        />
      </View>
    </View>
  );
}
