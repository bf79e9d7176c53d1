import { useEffect, useRef, useState, type ReactNode } from 'react';
import { Controller, useForm, useWatch, type FieldErrors, type Resolver } from 'react-hook-form';
import { View } from 'react-native';
import type { CheckoutForm as CheckoutFields } from '#shared/contracts/checkout-form-schema.ts';
import type { CollectionPoint } from '#shared/contracts/shop.ts';
import type { FieldErrors as ServerFields } from '#shared/errors.ts';
import { CONSENT_VERSION, consentWords } from '#shared/domain/consent.ts';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { FormCheckbox } from '#components/ui/form-checkbox.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { RadioGroup } from '#components/ui/radio-group.tsx';
import { AddressFields, type VanAnswer } from './address-fields.tsx';
import { PersonFields } from './person-fields.tsx';
import { SlotPicker } from './slot-picker.tsx';

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
  /** The van, where the farm has one: its word on the postcode that stands in the field. */
  van?: { answer: VanAnswer | undefined; onPostcode: (postcode: string) => void } | undefined;
  /** Told what is chosen, since the sum depends on it. */
  onChoice?: (choice: Pick<CheckoutFields, 'way' | 'pay'>) => void;
  /** How much a deposit would be, where one can be paid. */
  depositWords?: string | undefined;
};

const EMPTY: CheckoutFields = {
  ...{ way: 'collect', slotId: '', street: '', town: '', postcode: '' },
  ...{ name: '', email: '', phone: '', note: '', wantsNews: false, pay: 'in full' },
};

const NAMES = ['slotId', 'postcode', 'street', 'name', 'email', 'phone', 'note'] as const;

const WAYS = [
  { value: 'collect', label: 'I collect it' },
  { value: 'deliver', label: 'Bring it to me', note: 'By our van, where it comes.' },
];

const PAY_IN_FULL = { value: 'in full', label: 'All of it' };

/** Place, time, name, e-mail, phone: one screen, filled in by the browser where it can. */
export function CheckoutForm(props: CheckoutFormProps) {
  const { points, refusal, isSending } = props;
  const form = useForm<CheckoutFields>({
    resolver: props.resolver,
    mode: 'onTouched',
    shouldFocusError: false,
    defaultValues: { ...EMPTY, ...props.known },
  });
  const [pointId, setPointId] = useState(points.length === 1 ? points[0]?.id : undefined);
  const slots = useRef<HTMLDivElement>(null);
  const { setError, setValue, getFieldState } = form;
  const [way, pay] = useWatch({ control: form.control, name: ['way', 'pay'] });
  const { onChoice } = props;
  useEffect(() => onChoice?.({ way, pay }), [onChoice, way, pay]);
  const chooseWay = (value: string) => setValue('way', value === 'deliver' ? 'deliver' : 'collect');
  const choosePay = (value: string) => setValue('pay', value === 'deposit' ? 'deposit' : 'in full');

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
        <Heading level={2}>{way === 'deliver' ? 'Bringing it' : 'Collecting it'}</Heading>
        {props.van ? (
          <RadioGroup label="Collect it, or have it brought?" value={way} choices={WAYS} onChange={chooseWay} />
        ) : null}
        {way === 'deliver' && props.van ? (
          <AddressFields
            control={form.control}
            onPostcode={props.van.onPostcode}
            answer={props.van.answer}
            onCollect={() => chooseWay('collect')}
          />
        ) : (
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
                error={fieldState.error?.message}
              />
            )}
          />
        )}
      </div>
      <PersonFields control={form.control} onEnter={submit} />
      {props.depositWords ? (
        <RadioGroup
          label="Pay all of it now, or a deposit?"
          value={pay}
          choices={[PAY_IN_FULL, { value: 'deposit', label: 'A deposit', note: props.depositWords }]}
          onChange={choosePay}
        />
      ) : null}
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
