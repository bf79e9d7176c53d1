import type { ReactNode } from 'react';
import { View } from 'react-native';
import { STANDING_WEEKS } from '#shared/domain/standing-order.ts';
import { formatDay, formatMoney } from '#shared/domain/words.ts';
import { css } from '#components/theme/css.ts';
import { Checkbox } from '#components/ui/checkbox.tsx';
import { ChipGroup } from '#components/ui/chip-group.tsx';
import { Field } from '#components/ui/field.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { RadioGroup } from '#components/ui/radio-group.tsx';
import { Text } from '#components/ui/text.tsx';

export type StandingValues = {
  slug: string;
  dayId: string;
  everyWeeks: string;
  slotId: string;
  phone: string;
  isAgreed: boolean;
};

type StandingFieldsProps = {
  values: StandingValues;
  onChange: (change: Partial<StandingValues>) => void;
  boxes: readonly { slug: string; name: string; pricePence: number; isFree: boolean }[];
  days: readonly { id: string; day: string }[];
  /** Where and when the boxes are collected. */
  slots: ReactNode;
  terms: string;
  reminderDays: { first: number; second: number };
  errors: Record<string, string | undefined>;
};

/** What a standing order is made of, and what it agrees to. */
export function StandingFields(props: StandingFieldsProps) {
  const { values, onChange, boxes, days, errors, reminderDays } = props;
  return (
    <>
      <RadioGroup
        ruled
        label="Which box?"
        value={values.slug}
        choices={boxes.map((box) => ({
          value: box.slug,
          label: box.name,
          end: formatMoney(box.pricePence),
          disabled: !box.isFree,
          note: box.isFree ? undefined : 'sold out on this day',
        }))}
        onChange={(slug) => onChange({ slug })}
        error={errors.slug}
      />
      <ChipGroup
        label="How often?"
        value={values.everyWeeks}
        chips={STANDING_WEEKS.map((weeks) => ({ value: String(weeks), label: `Every ${weeks} weeks` }))}
        onChange={(everyWeeks) => onChange({ everyWeeks })}
        error={errors.everyWeeks}
      />
      <ChipGroup
        label="First box"
        hint="You pay for this one now, by card; the card is kept for the next ones."
        value={values.dayId}
        chips={days.map(({ id, day }) => ({ value: id, label: formatDay(day) }))}
        onChange={(dayId) => onChange({ dayId, slotId: '' })}
      />
      <View style={css('w-section')}>
        <Heading level={2}>Collecting it</Heading>
        {props.slots}
      </View>
      <Field
        label="Phone"
        autoComplete="tel"
        inputMode="tel"
        value={values.phone}
        onChangeText={(phone) => onChange({ phone })}
        error={errors.phone}
      />
      <View style={css('w-section')}>
        <Heading level={2}>What you agree to</Heading>
        <Text measure>{props.terms}</Text>
        <Text tone="quiet" measure>
          {`We remind you ${reminderDays.first} and ${reminderDays.second} days before each charge, with the way to skip that box.`}
        </Text>
        <Checkbox
          label="I agree, and my card may be charged for each box that I do not skip"
          checked={values.isAgreed}
          onChange={(isAgreed) => onChange({ isAgreed })}
          error={errors.isAgreed}
        />
      </View>
    </>
  );
}
