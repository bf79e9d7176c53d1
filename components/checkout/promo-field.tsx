import { useState } from 'react';
import { View } from 'react-native';
import { formatMoney } from '#shared/domain/words.ts';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { Disclosure } from '#components/ui/disclosure.tsx';
import { Field } from '#components/ui/field.tsx';
import { Text } from '#components/ui/text.tsx';

type PromoFieldProps = {
  /** The code that counts for this basket, with what it takes off. */
  taken: { code: string; discountPence: number } | undefined;
  isAsking: boolean;
  error: string | undefined;
  use: (code: string) => void;
  drop: () => void;
};

/** A promotional code, with the farm's word about it beside the field. */
export function PromoField({ taken, isAsking, error, use, drop }: PromoFieldProps) {
  const [text, setText] = useState('');
  if (taken) {
    return (
      <View style={css('w-row-between')}>
        <Text live="status">{`${taken.code} takes ${formatMoney(taken.discountPence)} off.`}</Text>
        <Button kind="quiet" small label="Take the code out" onPress={drop} />
      </View>
    );
  }
  return (
    <Disclosure words="I have a code">
      <View style={css('w-stack-s')}>
        <Field
          label="Promotional code"
          autoComplete="off"
          autoCapitalize="characters"
          value={text}
          onChangeText={setText}
          onSubmitEditing={() => use(text)}
          error={error}
        />
        <View style={css('w-buttons')}>
          <Button
            kind="quiet"
            small
            label="Use the code"
            busy={isAsking}
            disabled={text.trim() === ''}
            onPress={() => use(text)}
          />
        </View>
      </View>
    </Disclosure>
  );
}
