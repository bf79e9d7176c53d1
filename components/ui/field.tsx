import { useId, type Ref } from 'react';
import { TextInput, type TextInputProps } from 'react-native';
import { describedBy, FieldFrame, type FieldWords } from './field-frame.tsx';
import { css } from '#components/theme/css.ts';

type FieldProps = FieldWords & {
  value: string;
  onChangeText: (text: string) => void;
  onBlur?: (() => void) | undefined;
  /** Enter in a one-line field. */
  onSubmitEditing?: (() => void) | undefined;
  autoComplete?: NonNullable<TextInputProps['autoComplete']>;
  inputMode?: NonNullable<TextInputProps['inputMode']>;
  enterKeyHint?: NonNullable<TextInputProps['enterKeyHint']>;
  autoCapitalize?: NonNullable<TextInputProps['autoCapitalize']>;
  multiline?: boolean;
  secret?: boolean;
  readOnly?: boolean;
  maxLength?: number;
  /** Signs inside the frame: `£` before, `kg` after. The label still has to say what is asked. */
  before?: string;
  after?: string;
  width?: 'full' | 'short' | 'cell';
  required?: boolean;
  ref?: Ref<TextInput>;
};

export function Field({ ref, ...props }: FieldProps) {
  const { label, hint, error, optional, isLabelHidden, before, after, multiline = false, width = 'full' } = props;
  const id = useId();
  const words = { label, hint, error, optional, isLabelHidden };
  return (
    <FieldFrame id={id} words={words}>
      <div className={`w-control w-control-${width}${error ? ' w-control-wrong' : ''}`}>
        {before ? <span className="w-affix">{before}</span> : null}
        <TextInput
          ref={ref}
          id={id}
          value={props.value}
          onChangeText={props.onChangeText}
          onBlur={() => props.onBlur?.()}
          onSubmitEditing={() => props.onSubmitEditing?.()}
          autoComplete={props.autoComplete ?? 'off'}
          inputMode={props.inputMode ?? 'text'}
          {...(props.enterKeyHint ? { enterKeyHint: props.enterKeyHint } : {})}
          autoCapitalize={props.autoCapitalize ?? (props.inputMode === 'email' ? 'none' : 'sentences')}
          multiline={multiline}
          numberOfLines={multiline ? 4 : 1}
          secureTextEntry={props.secret ?? false}
          readOnly={props.readOnly ?? false}
          {...(props.maxLength ? { maxLength: props.maxLength } : {})}
          aria-describedby={describedBy(id, words)}
          aria-invalid={Boolean(error)}
          aria-required={props.required ?? !optional}
          style={css('w-input', multiline && 'w-input-tall')}
        />
        {after ? <span className="w-affix">{after}</span> : null}
      </div>
    </FieldFrame>
  );
}
