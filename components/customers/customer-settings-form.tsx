import type { Control } from 'react-hook-form';
import { View } from 'react-native';
import type { CustomerSettings } from '#shared/contracts/customers.ts';
import { STANDING_CAUTION } from '#shared/domain/standing-order.ts';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { FormFrame } from '#components/ui/form-frame.tsx';
import { FormNumber } from '#components/ui/form-number.tsx';
import { FormText } from '#components/ui/form-text.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { Notice } from '#components/ui/notice.tsx';

type CustomerSettingsFormProps = { control: Control<CustomerSettings>; onSubmit: () => void; busy: boolean };

/** In force from today on; who agreed to terms before keeps those. */
export function CustomerSettingsForm({ control, onSubmit, busy }: CustomerSettingsFormProps) {
  return (
    <FormFrame name="Keeping in touch" onSubmit={onSubmit}>
      <Heading level={2}>Keeping in touch</Heading>
      <View style={css('w-fields')}>
        <FormNumber
          control={control}
          name="inviteAfterWeeks"
          unit="count"
          after="weeks"
          label="Invite to order again after"
          hint="Only those who agreed to such mail, once after each last order."
        />
        <FormNumber
          control={control}
          name="waitingHoldHours"
          unit="count"
          after="hours"
          label="Keep a box for the next in line for"
        />
      </View>
      <Heading level={2}>Standing orders</Heading>
      <Notice kind="held" title={STANDING_CAUTION} />
      <View style={css('w-fields')}>
        <FormNumber
          control={control}
          name="standingFirstReminderDays"
          unit="count"
          after="days"
          label="First reminder, before the charge"
        />
        <FormNumber
          control={control}
          name="standingSecondReminderDays"
          unit="count"
          after="days"
          label="Second reminder, before the charge"
        />
        <FormNumber
          control={control}
          name="standingChargeHours"
          unit="count"
          after="hours"
          label="Charge the card, before orders close"
        />
      </View>
      <FormText control={control} name="standingTerms" label="Terms, and the way out of them" multiline />
      <View style={css('w-buttons')}>
        <Button label="Save" busy={busy} onPress={onSubmit} />
      </View>
    </FormFrame>
  );
}
