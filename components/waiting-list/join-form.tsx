import { useState } from 'react';
import { View } from 'react-native';
import { formatDay } from '#shared/domain/words.ts';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { ChipGroup } from '#components/ui/chip-group.tsx';
import { Disclosure } from '#components/ui/disclosure.tsx';
import { Field } from '#components/ui/field.tsx';
import { FormFrame } from '#components/ui/form-frame.tsx';
import { Notice } from '#components/ui/notice.tsx';

type JoinFormProps = {
  box: string;
  /** The day that is sold out; none while no day is open. */
  day: string | undefined;
  isSending: boolean;
  sentTo: string | undefined;
  refusal: { message: string; email: string | undefined } | undefined;
  onJoin: (wish: { email: string; isAnyDay: boolean }) => void;
};

/** For a box that is sold out: to be told when there is one again, with one kept for a while. */
export function JoinForm({ box, day, isSending, sentTo, refusal, onJoin }: JoinFormProps) {
  const [email, setEmail] = useState('');
  const [which, setWhich] = useState(day ? 'this' : 'any');
  const [isEmpty, setIsEmpty] = useState(false);
  const send = () => {
    setIsEmpty(email.trim() === '');
    if (email.trim() !== '') onJoin({ email: email.trim(), isAnyDay: which === 'any' || !day });
  };
  if (sentTo) {
    return (
      <Notice
        kind="held"
        spoken
        title={`We wrote to ${sentTo}.`}
        next="Press the button in that mail to go on the list."
      />
    );
  }
  return (
    <Disclosure words={`Tell me when ${box} can be had again`}>
      <FormFrame name={`Waiting list for ${box}`} onSubmit={send}>
        {day ? (
          <ChipGroup
            label="For which day?"
            value={which}
            chips={[
              { value: 'any', label: 'Any day' },
              { value: 'this', label: formatDay(day) },
            ]}
            onChange={setWhich}
          />
        ) : null}
        <Field
          label="E-mail"
          hint="We keep one for you for a while, in the order of the list. Nothing is owed until you order."
          autoComplete="email"
          inputMode="email"
          value={email}
          onChangeText={(text) => {
            setEmail(text);
            setIsEmpty(false);
          }}
          error={isEmpty ? 'Give your e-mail address.' : refusal?.email}
        />
        {refusal && !refusal.email ? <Notice kind="error" title={refusal.message} /> : null}
        <View style={css('w-buttons')}>
          <Button kind="quiet" label="Put me on the list" busy={isSending} onPress={send} />
        </View>
      </FormFrame>
    </Disclosure>
  );
}
