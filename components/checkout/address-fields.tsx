import { Controller, type Control } from 'react-hook-form';
import { View } from 'react-native';
import type { CheckoutForm } from '#shared/contracts/checkout-form-schema.ts';
import { londonDay } from '#shared/domain/day.ts';
import { formatDay, formatMoney, formatTime } from '#shared/domain/words.ts';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { Field } from '#components/ui/field.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { Text } from '#components/ui/text.tsx';

/** The farm's word on a postcode: the round that comes there, or where to collect instead. */
export type VanAnswer = {
  area: {
    name: string;
    pricePence: number;
    freeFromPence: number | null;
    startsAt: string;
    endsAt: string;
    free: number;
  } | null;
  nearest: { name: string; addressLines: string[] } | null;
};

type AddressFieldsProps = {
  control: Control<CheckoutForm>;
  onPostcode: (postcode: string) => void;
  answer: VanAnswer | undefined;
  onCollect: () => void;
};

const FIELDS = [
  { name: 'postcode', label: 'Postcode', autoComplete: 'postal-code', autoCapitalize: 'characters', optional: false },
  {
    name: 'street',
    label: 'House and street',
    autoComplete: 'address-line1',
    autoCapitalize: 'words',
    optional: false,
  },
  { name: 'town', label: 'Village or town', autoComplete: 'address-line2', autoCapitalize: 'words', optional: true },
] as const;

/** The postcode first, since it decides whether the van comes at all. */
export function AddressFields({ control, onPostcode, answer, onCollect }: AddressFieldsProps) {
  return (
    <View style={css('w-section')}>
      {FIELDS.map((about) => (
        <View key={about.name} style={css('w-stack-s')}>
          <Controller
            control={control}
            name={about.name}
            render={({ field, fieldState }) => (
              <Field
                ref={field.ref}
                label={about.label}
                optional={about.optional}
                autoComplete={about.autoComplete}
                autoCapitalize={about.autoCapitalize}
                value={field.value}
                onChangeText={(text) => {
                  field.onChange(text);
                  if (about.name === 'postcode') onPostcode(text);
                }}
                onBlur={field.onBlur}
                error={fieldState.error?.message}
              />
            )}
          />
          {about.name === 'postcode' && answer ? <VanWords answer={answer} onCollect={onCollect} /> : null}
        </View>
      ))}
    </View>
  );
}

function VanWords({ answer: { area, nearest }, onCollect }: { answer: VanAnswer; onCollect: () => void }) {
  if (area && area.free > 0) {
    const { pricePence, freeFromPence, startsAt, endsAt } = area;
    const threshold = freeFromPence === null ? '' : `, free from ${formatMoney(freeFromPence)} on`;
    return (
      <Text live="status">
        {`The van comes ${formatDay(londonDay(startsAt))}, ${formatTime(startsAt)} to ${formatTime(endsAt)}, for ${formatMoney(pricePence)}${threshold}.`}
      </Text>
    );
  }
  return (
    <Notice
      kind="held"
      spoken
      title={area ? 'The van is full on this round.' : 'The van does not come here.'}
      next={
        nearest ? `The nearest place to collect is ${nearest.name}, ${nearest.addressLines.join(', ')}.` : undefined
      }
    >
      <Button kind="quiet" small label="Collect it instead" onPress={onCollect} />
    </Notice>
  );
}
