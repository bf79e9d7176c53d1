import { useState } from 'react';
import { View } from 'react-native';
import type { Feedback, FeedbackEdit } from '#shared/contracts/feedback.ts';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { ChipGroup } from '#components/ui/chip-group.tsx';
import { Field } from '#components/ui/field.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { Notice } from '#components/ui/notice.tsx';

const STARS = [
  { value: '1', label: '1', note: 'poor' },
  { value: '2', label: '2', note: 'so-so' },
  { value: '3', label: '3', note: 'good' },
  { value: '4', label: '4', note: 'very good' },
  { value: '5', label: '5', note: 'the best' },
];
const MOST_CHARACTERS = 500;

type FeedbackFormProps = {
  given: Feedback['given'];
  isSending: boolean;
  isSaved: boolean;
  error: string | undefined;
  onSend: (feedback: FeedbackEdit) => void;
};

/** One to five and some words, which can be changed later. Only the farm reads them. */
export function FeedbackForm({ given, isSending, isSaved, error, onSend }: FeedbackFormProps) {
  const [stars, setStars] = useState(given ? String(given.stars) : '');
  const [words, setWords] = useState(given?.words ?? '');
  const [isMissing, setIsMissing] = useState(false);
  const send = () => {
    setIsMissing(stars === '');
    if (stars !== '') onSend({ stars: Number(stars), words: words.trim() });
  };
  return (
    <View style={css('w-section')}>
      <Heading level={2}>How was it?</Heading>
      {isSaved ? <Notice kind="good" spoken title="Thank you. The farm reads every word." /> : null}
      <ChipGroup
        label="From one to five"
        hint="Only the farm sees it, and you can change it later."
        value={stars}
        chips={STARS}
        onChange={(value) => {
          setStars(value);
          setIsMissing(false);
        }}
        error={isMissing ? 'Choose one to five.' : undefined}
      />
      <Field
        label="In your words"
        optional
        multiline
        maxLength={MOST_CHARACTERS}
        value={words}
        onChangeText={setWords}
      />
      {error ? <Notice kind="error" title={error} /> : null}
      <View style={css('w-buttons')}>
        <Button kind="quiet" label={given ? 'Change what I said' : 'Tell the farm'} busy={isSending} onPress={send} />
      </View>
    </View>
  );
}
