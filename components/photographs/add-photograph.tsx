import { useId, useState } from 'react';
import { View } from 'react-native';
import { PHOTOGRAPH_TYPES } from '#shared/domain/photograph.ts';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { Field } from '#components/ui/field.tsx';
import { describedBy, FieldFrame } from '#components/ui/field-frame.tsx';
import { FormFrame } from '#components/ui/form-frame.tsx';

type AddPhotographProps = { isSending: boolean; onAdd: (picture: { file: File; alt: string }) => void };

/** A picture from the phone or the computer, and what is to be seen in it. */
export function AddPhotograph({ isSending, onAdd }: AddPhotographProps) {
  const id = useId();
  const [file, setFile] = useState<File>();
  const [alt, setAlt] = useState('');
  const [isAsked, setIsAsked] = useState(false);
  const words = {
    label: 'Picture',
    hint: 'JPEG, PNG or WebP. It is made smaller before it is sent, without the place where it was taken.',
    error: isAsked && !file ? 'Choose a picture.' : undefined,
  };
  const send = () => {
    setIsAsked(true);
    if (file && alt.trim()) onAdd({ file, alt: alt.trim() });
  };
  return (
    <FormFrame name="Add a photograph" onSubmit={send}>
      <FieldFrame id={id} words={words}>
        <input
          id={id}
          type="file"
          accept={PHOTOGRAPH_TYPES.join(',')}
          onChange={(event) => setFile(event.target.files?.[0])}
          aria-describedby={describedBy(id, words)}
        />
      </FieldFrame>
      <Field
        label="What is to be seen"
        hint="For people who cannot see it, and while it loads."
        value={alt}
        onChangeText={setAlt}
        maxLength={120}
        error={isAsked && !alt.trim() ? 'Say in a few words what is to be seen.' : undefined}
      />
      <View style={css('w-buttons')}>
        <Button label="Add the photograph" busy={isSending} onPress={send} />
      </View>
    </FormFrame>
  );
}
