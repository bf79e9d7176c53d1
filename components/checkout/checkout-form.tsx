import { useEffect, useRef, useState, type ReactNode } from 'react';
import { Controller, useForm, type FieldErrors, type Resolver, type UseFormReturn } from 'react-hook-form';
import { View } from 'react-native';
import type { Checkout } from '#shared/contracts/orders.ts';
import type { CollectionPoint } from '#shared/contracts/shop.ts';
import type { FieldErrors as ServerFields } from '#shared/errors.ts';
import { CONSENT_VERSION, consentWords } from '#shared/domain/consent.ts';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { Field } from '#components/ui/field.tsx';
import { FormCheckbox } from '#components/ui/form-checkbox.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { SlotPicker } from './slot-picker.tsx';

/** What the person fills in; key, day and lines come from the basket. */
export type CheckoutFields = Pick<Checkout, 'slotId' | 'name' | 'email' | 'phone' | 'note' | 'wantsNews'>;

type CheckoutFormProps = {
  points: readonly CollectionPoint[];
  resolver: Resolver<CheckoutFields>;
  /** Who is signed in, as far as known. */
  known: Partial<CheckoutFields>;
  /** False for somebody who gets marketing mail already. */
  asksNews?: boolean;
  /** What pressing the button agrees to. */
  terms: ReactNode;
  buttonLabel: string;
  isSending: boolean;
  /** The farm's refusal: a sentence, and what belongs beside fields. */
  refusal: { message: string; fields: ServerFields } | undefined;
  onSubmit: (fields: CheckoutFields) => void;
};

const NAMES = ['slotId', 'name', 'email', 'phone', 'note'] as const;

/** Place, time, name, e-mail, phone: one screen, filled in by the browser where it can. */
export function CheckoutForm(props: CheckoutFormProps) {
  const { points, refusal, isSending } = props;
  const form = useForm<CheckoutFields>({
    resolver: props.resolver,
    mode: 'onTouched',
    shouldFocusError: false,
    defaultValues: { slotId: '', name: '', email: '', phone: '', note: '', wantsNews: false, ...props.known },
  });
  const [pointId, setPointId] = useState(points.length === 1 ? points[0]?.id : undefined);
  const slots = useRef<HTMLDivElement>(null);
  const { setError, setValue, getFieldState } = form;

  useEffect(() => {
    for (const name of NAMES) {
      const message = refusal?.fields[name];
      if (message) setError(name, { message });
    }
  }, [refusal, setError]);

  const { name: knownName, email: knownEmail, phone: knownPhone } = props.known;
  useEffect(() => {
    if (knownName && !getFieldState('name').isDirty) setValue('name', knownName);
    if (knownEmail && !getFieldState('email').isDirty) setValue('email', knownEmail);
    if (knownPhone && !getFieldState('phone').isDirty) setValue('phone', knownPhone);
  }, [knownName, knownEmail, knownPhone, setValue, getFieldState]);

  // The places and times are no single control: the library would pass over them to the next field that is wrong.
  const focusFirst = (errors: FieldErrors<CheckoutFields>) => {
    const wrong = NAMES.find((name) => errors[name]);
    if (wrong === 'slotId') slots.current?.querySelector<HTMLElement>('input:not(:disabled)')?.focus();
    else if (wrong) form.setFocus(wrong);
  };
  const submit = () => {
    void form.handleSubmit(props.onSubmit, focusFirst)();
  };
  return (
    <form className="w-form" noValidate onSubmit={(event) => event.preventDefault()}>
      <div className="w-section" ref={slots}>
        <Heading level={2}>Collecting it</Heading>
        <Controller
          control={form.control}
          name="slotId"
          render={({ field, fieldState }) => (
            <SlotPicker
              points={points}
              pointId={pointId}
              onPoint={(id) => {
                setPointId(id);
                field.onChange('');
                form.clearErrors('slotId');
              }}
              slotId={field.value}
              onSlot={(id) => {
                field.onChange(id);
                form.clearErrors('slotId');
              }}
              error={fieldState.error ? slotWords(fieldState.error.message, field.value) : undefined}
            />
          )}
        />
      </div>
      <PersonFields form={form} onEnter={submit} />
      {props.asksNews === false ? null : (
        <FormCheckbox
          control={form.control}
          name="wantsNews"
          label={consentWords(CONSENT_VERSION)}
          note="Only if you like: the order does not depend on it, and each such mail has a way out."
        />
      )}
      {refusal ? <Notice kind="error" title={refusal.message} /> : null}
      <View style={css('w-stack')}>
        {props.terms}
        <Button wide label={props.buttonLabel} busy={isSending} busyLabel="Keeping it for you …" onPress={submit} />
      </View>
    </form>
  );
}

/** The contract speaks of numbers; a person has simply not chosen yet. */
function slotWords(message: string | undefined, slotId: string): string | undefined {
  return slotId === '' ? 'Choose a place and a time.' : message;
}

type PersonFieldsProps = { form: UseFormReturn<CheckoutFields>; onEnter: () => void };

function PersonFields({ form, onEnter }: PersonFieldsProps) {
  const fields = [
    { name: 'name', label: 'Name', autoComplete: 'name', inputMode: 'text', autoCapitalize: 'words' },
    {
      name: 'email',
      label: 'E-mail',
      autoComplete: 'email',
      inputMode: 'email',
      hint: 'For the confirmation and the link to your order.',
    },
    {
      name: 'phone',
      label: 'Phone',
      autoComplete: 'tel',
      inputMode: 'tel',
      hint: 'Only if something about your collection changes.',
    },
    { name: 'note', label: 'A note for the packer', autoComplete: 'off', inputMode: 'text', optional: true },
  ] as const;
  return (
    <View style={css('w-section')}>
      <Heading level={2}>About you</Heading>
      {fields.map((about) => (
        <Controller
          key={about.name}
          control={form.control}
          name={about.name}
          render={({ field, fieldState }) => (
            <Field
              ref={field.ref}
              label={about.label}
              hint={'hint' in about ? about.hint : undefined}
              optional={'optional' in about}
              multiline={about.name === 'note'}
              autoComplete={about.autoComplete}
              inputMode={about.inputMode}
              {...('autoCapitalize' in about ? { autoCapitalize: about.autoCapitalize } : {})}
              value={field.value}
              onChangeText={field.onChange}
              onBlur={field.onBlur}
              {...(about.name === 'note' ? {} : { onSubmitEditing: onEnter })}
              error={fieldState.error?.message}
            />
          )}
        />
      ))}
    </View>
  );
}
