import type { ReactNode } from 'react';
import { useEffect } from 'react';
import { Controller, useForm } from 'react-hook-form';
import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { Field } from '#components/ui/field.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { accountFields, type AccountField } from './account-fields.ts';

export type AccountValues = { name: string; email: string; password: string };

type AccountFormProps = {
  fields: readonly AccountField[];
  buttonLabel: string;
  isSending: boolean;
  refusal: { message: string; field?: string | undefined } | undefined;
  onSubmit: (values: AccountValues) => void;
  /** Under the button: other ways. */
  children?: ReactNode;
};

/** Signing in, opening an account, choosing a password: the same few fields. */
export function AccountForm({ fields, buttonLabel, isSending, refusal, onSubmit, children }: AccountFormProps) {
  const form = useForm<AccountValues>({ mode: 'onTouched', defaultValues: { name: '', email: '', password: '' } });
  const { setError } = form;
  useEffect(() => {
    if (refusal?.field === 'email' || refusal?.field === 'password') {
      setError(refusal.field, { message: refusal.message });
    }
  }, [refusal?.field, refusal?.message, setError]);
  const submit = () => void form.handleSubmit(onSubmit)();
  return (
    <form className="w-section" noValidate onSubmit={(event) => event.preventDefault()}>
      {fields.map((which) => {
        const { name, rules, ...about } = accountFields[which];
        return (
          <Controller
            key={which}
            control={form.control}
            name={name}
            rules={rules}
            render={({ field, fieldState }) => (
              <Field
                {...about}
                ref={field.ref}
                value={field.value}
                onChangeText={field.onChange}
                onBlur={field.onBlur}
                onSubmitEditing={submit}
                error={fieldState.error?.message}
              />
            )}
          />
        );
      })}
      {refusal ? <Notice kind="error" title={refusal.message} /> : null}
      <Button wide label={buttonLabel} busy={isSending} busyLabel="One moment …" onPress={submit} />
      {children ? <View style={css('w-stack-s')}>{children}</View> : null}
    </form>
  );
}
